using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Forecasts;

/// <summary>Takes out of assessments what is followed over time. Only decided ones count: the others were made while the source was not settled, or do not resolve their limit.</summary>
internal static class TrackedPoints
{
    private const double IceKelvin = 273.15;

    /// <summary>The criteria whose assessments are followed.</summary>
    public static IReadOnlyList<string> Criteria { get; } =
        [CriterionCode.EffectiveEmissivity, CriterionCode.Stability, CriterionCode.AxialUniformity, CriterionCode.Budget, CriterionCode.ReferenceAgreement, CriterionCode.HeaterBalance];

    /// <summary>The points of one assessment.</summary>
    /// <param name="source">The source as it is described now.</param>
    /// <param name="assessment">The assessment.</param>
    public static IEnumerable<TrackedPoint> Of(ReferenceSource source, Assessment assessment)
    {
        if (assessment.Decision is Decision.NotDecided || !assessment.Value.HasValue)
        {
            return [];
        }

        return assessment.Criterion switch
        {
            CriterionCode.EffectiveEmissivity => Emissivity(source, assessment),
            CriterionCode.AxialUniformity => Uniformity(source, assessment),
            _ => [Point(assessment, TrackedQuantity.CriterionValue, assessment.Value.Value, assessment.Unit, assessment.Limit, string.Empty)],
        };
    }

    private static IEnumerable<TrackedPoint> Uniformity(ReferenceSource source, Assessment assessment)
    {
        yield return Point(assessment, TrackedQuantity.CriterionValue, assessment.Value.Value, assessment.Unit, assessment.Limit, string.Empty);
        string own = "mean-" + source.ReferenceChannel?.Id;
        double[] others = [.. assessment.Figures.Where(figure => figure.Name.StartsWith("mean-", StringComparison.Ordinal) && figure.Name != own).Select(figure => figure.Value.Value)];
        double reference = Figure(assessment, own);
        if (others.Length > 0 && double.IsFinite(reference))
        {
            yield return Point(assessment, TrackedQuantity.WellDifference, (reference - others.Average()) * 1000, "mK", null, string.Empty);
        }
    }

    private static IEnumerable<TrackedPoint> Emissivity(ReferenceSource source, Assessment assessment)
    {
        double baseline = Figure(assessment, "baseline-emissivity"), comparator = Figure(assessment, "comparator-emissivity");
        string basis = baseline.ToString("R", System.Globalization.CultureInfo.InvariantCulture);
        double? millikelvin = assessment.Limit is { } limit ? Millikelvin(source, assessment, limit) : null;
        if (double.IsNaN(comparator))
        {
            yield return Point(assessment, TrackedQuantity.EmissivityDeparture, Figure(assessment, "effective-emissivity") - baseline, "/", assessment.Limit, basis);
            yield return Point(assessment, TrackedQuantity.RadianceOffset, Figure(assessment, "radiance-temperature-offset"), "mK", millikelvin, string.Empty);
            yield break;
        }

        yield return Point(assessment, TrackedQuantity.ComparatorDeparture, comparator - baseline, "/", assessment.Limit, basis);
        yield return Point(assessment, TrackedQuantity.ComparatorOffset, Figure(assessment, "comparator-minus-model"), "mK", millikelvin, string.Empty);
    }

    /// <summary>What a change of the effective emissivity does to the radiance temperature: dT = de (L(T_ref) - L(T_bg)) / (dL/dT at T_ref), millikelvin.</summary>
    private static double? Millikelvin(ReferenceSource source, Assessment assessment, double change)
    {
        string? id = source.Bands.Any(band => band.Id == assessment.Scope) ? assessment.Scope : source.FindChannel(assessment.Scope)?.Band;
        WorkingBand? band = source.Bands.FirstOrDefault(candidate => candidate.Id == id);
        double reference = Figure(assessment, FigureName.Mean), surroundings = Figure(assessment, "surroundings");
        if (band is null || !double.IsFinite(reference) || !double.IsFinite(surroundings))
        {
            return null;
        }

        RadianceBand radiance = RadianceBand.Of(band.LowerMicrometre, band.UpperMicrometre);
        double own = reference + IceKelvin;
        return Math.Abs(change * (radiance.Radiance(own) - radiance.Radiance(surroundings + IceKelvin)) / radiance.RadianceSlope(own)) * 1000;
    }

    private static TrackedPoint Point(Assessment assessment, string quantity, double value, string unit, double? limit, string basis)
    {
        double setPoint = Figure(assessment, FigureName.SetPoint);
        double nominal = double.IsFinite(setPoint) ? Math.Round(setPoint, 1) : Math.Round(Figure(assessment, FigureName.Mean), 0);
        return new(
            new(assessment.Criterion, assessment.Scope, quantity, unit, nominal),
            assessment.Window.End,
            value,
            limit,
            string.Join(' ', [basis, .. assessment.Provenance.Certificates]),
            assessment.Id);
    }

    private static double Figure(Assessment assessment, string name) => CriterionResult.Figure(assessment.Figures, name);
}
