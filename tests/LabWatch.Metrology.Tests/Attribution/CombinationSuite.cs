using LabWatch.Metrology.Attribution;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Attribution;

public sealed class CombinationSuite : CheckSuite
{
    public override string Title => "Weighted means and attribution by least squares";

    public override string Introduction =>
        "Weighted means with chi-squared and Birge ratio, thermometer error and change of emissivity from deviations in several bands, and the exact deviations that "
        + "such changes make. All computed elsewhere to 40 digits; the inputs are invented.";

    protected override IEnumerable<Check> Build() => CheckRow.Read("t09_combination.csv").Select(row => Check.Of(row, () => Compute(row)));

    private static double Compute(CheckRow row) => row.Group switch
    {
        "weighted_mean" => WeightedMean(row),
        "attribution_lsq" => TwoCauses(row),
        _ when row.Has("dT_K") => Forward(row),
        _ => Recovered(row),
    };

    private static double WeightedMean(CheckRow row)
    {
        double[] x = row.Numbers("x");
        GeneralisedFit fit = GeneralisedFit.Of([.. x.Select(_ => new[] { 1.0 })], x, GeneralisedFit.Independent(row.Numbers("u")))!;
        double u = fit.Coefficients[0].StandardUncertainty;
        return row.Quantity switch
        {
            "weighted mean" => fit.Coefficients[0].Value,
            "internal u" => u,
            "external u = R_B * internal" => u * fit.BirgeRatio,
            "chi2 obs" => fit.ChiSquared,
            "Birge ratio" => fit.BirgeRatio,
            "P(chi2 > obs), nu=n-1" => fit.Probability,
            "u expanded by max(1,R_B)" => u * Math.Max(1, fit.BirgeRatio),
            _ => throw new FormatException(row.Quantity),
        };
    }

    private static double TwoCauses(CheckRow row)
    {
        double[] slopes = Slopes(row, row.Number("T_K"), row.Text("sensitivity") == "Wien");
        GeneralisedFit fit = Fit(slopes, row.Numbers("D_K"), row.Numbers("u_K"));
        return row.Quantity switch
        {
            "dT_thermometer" => fit.Coefficients[0].Value,
            "deps/eps" => fit.Coefficients[1].Value,
            "u(dT)" => fit.Coefficients[0].StandardUncertainty,
            "u(deps/eps)" => fit.Coefficients[1].StandardUncertainty,
            "correlation r(dT,deps)" => fit.Correlation(0, 1),
            "chi2" => fit.ChiSquared,
            "s_1" => slopes[0],
            "s_last" => slopes[^1],
            _ => throw new FormatException(row.Quantity),
        };
    }

    private static double Forward(CheckRow row)
    {
        double nominal = row.Number("T_nominal_K");
        RadianceTemperature seen = ReflectedSurroundings.Evaluate(
            RadianceBand.At(row.Number("lambda_um")), nominal + row.Number("dT_K"), row.Number("eps0") + row.Number("deps"), row.Number("T_surround_K"));
        return seen.Kelvin - nominal;
    }

    private static double Recovered(CheckRow row)
    {
        double[] deviations = row.Numbers("D_K");
        GeneralisedFit fit = Fit(Slopes(row, row.Number("T_nominal_K"), wien: false), deviations, [.. deviations.Select(_ => 1.0)]);
        return fit.Coefficients[row.Quantity.StartsWith("dT", StringComparison.Ordinal) ? 0 : 1].Value;
    }

    private static GeneralisedFit Fit(double[] slopes, double[] deviations, double[] uncertainties) =>
        GeneralisedFit.Of([.. slopes.Select(slope => new[] { 1.0, slope })], deviations, GeneralisedFit.Independent(uncertainties))!;

    private static double[] Slopes(CheckRow row, double kelvin, bool wien) =>
        [.. row.Numbers("lambda_um").Select(micrometre => PlanckLaw.EmissivitySensitivity(micrometre, kelvin, wien))];
}
