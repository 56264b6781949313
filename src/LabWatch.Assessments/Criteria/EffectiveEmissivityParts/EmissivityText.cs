using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Profiles;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.EffectiveEmissivityParts;

/// <summary>Parts of sentences about effective emissivity.</summary>
internal static class EmissivityText
{
    /// <summary>A value with its expanded uncertainty.</summary>
    public static string With(Estimate estimate) =>
        $"{Quantities.Value(estimate.Value, Expanded(estimate))} (U = {Quantities.Significant(Expanded(estimate))}, k = {Quantities.Fixed(CoverageFactor.For(estimate.DegreesOfFreedom), 2)})";

    /// <summary>A value to the decimal place of another's uncertainty.</summary>
    public static string At(double value, Estimate like) => Quantities.Value(value, Expanded(like));

    /// <summary>A difference with its sign and expanded uncertainty.</summary>
    public static string Signed(Estimate estimate, string unit) =>
        $"{(estimate.Value > 0 ? "+" : string.Empty)}{Quantities.Value(estimate.Value, Expanded(estimate))} {unit} (U = {Quantities.Significant(Expanded(estimate))} {unit})";

    /// <summary>u = ...</summary>
    public static string Uncertainty(Estimate estimate) => $"u = {Quantities.Significant(estimate.StandardUncertainty)}";

    /// <summary>The method with its numerical error, and what the uncertainty is made of.</summary>
    public static string Method(BandModel model, BandRadiance radiance)
    {
        string method = model.Method switch
        {
            "ring-kernels" => $"Method: ring kernels for diffuse walls, numerical error {Quantities.Significant(model.MethodError, 1)}",
            "monte-carlo" => $"Method: Monte Carlo at a diffuse fraction of {Quantities.Fixed(model.Optics.DiffuseFraction.Value, 3)} with {Quantities.Count((int)model.Weights!.Counts.Rays)} rays, seed {Seed}, standard error {Quantities.Significant(model.MethodError, 2)}",
            "flat-plate" => "Method: flat plate, e_eff is the emissivity of the coating",
            _ => "Method: closed form",
        };
        (string Name, double Value)[] parts =
        [
            ("coating emissivity", radiance.Part(ContributionKind.Emissivity)),
            ("second coating", radiance.Part(ContributionKind.SecondEmissivity)),
            ("diffuse fraction", radiance.Part(ContributionKind.DiffuseFraction)),
            ("wells", radiance.Part(ContributionKind.Well)),
            ("well-to-wall drop", radiance.Part(ContributionKind.WellToWall)),
            ("lip", double.Hypot(radiance.Part(ContributionKind.Lip), radiance.Part(ContributionKind.LipShape))),
        ];
        string largest = string.Join(", ", parts.Where(part => part.Value > 0).OrderByDescending(part => part.Value).Take(3)
            .Select(part => $"{part.Name} {Quantities.Significant(part.Value, 2)}"));
        return $"{method}. Largest standard uncertainties of e_eff: {largest}.";
    }

    private static string Seed => CavityTraces.Options.Seed.ToString(System.Globalization.CultureInfo.InvariantCulture);

    private static double Expanded(Estimate estimate) => CoverageFactor.For(estimate.DegreesOfFreedom) * estimate.StandardUncertainty;
}
