using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Agreement of independent results of one quantity.</summary>
internal sealed class AgreementCalculator : Calculator
{
    public override string Name => "agreement";

    public override string Summary => "Weighted mean of independent results, their consistency, and the normalised error of each against a reference value.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "mean = sum(x/u^2)/sum(1/u^2); internal u = sum(1/u^2)^(-1/2)",
        "chi squared = sum((x - mean)^2/u^2); Birge ratio = sqrt(chi squared/(n - 1)); external u = Birge ratio times internal u",
        "E_n = (x - X)/sqrt(U_x^2 + U_X^2), U = k u; agreement where its magnitude is at most 1",
        "redundant thermometers that share a calibration or a bridge are not independent: E_n hides what they share",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "M. G. Cox, Metrologia 39 (2002) 589-595, procedure A",
        "R. T. Birge, Phys. Rev. 40 (1932) 207-227",
        "ISO/IEC 17043:2010, B.3.1.3",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Objects(
            "results",
            "independent results in one unit",
            CalcField.Number("value", "the result"),
            CalcField.Positive("u", "its standard uncertainty")) with { MaximumItems = 10_000 },
        CalcField.Number("reference", "reference value for E_n; the comparison is left out where missing").Optional(),
        CalcField.NotNegative("u_reference", "its standard uncertainty; 0 where missing").Optional(),
        CalcField.Positive("k", "coverage factor of all U; 2 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("mean", "weighted mean"),
        ("u_internal", "its standard uncertainty from the stated ones"),
        ("u_external", "the same from the scatter; null for one result"),
        ("chi_squared", "observed chi squared"),
        ("degrees_of_freedom", "n - 1"),
        ("birge_ratio", "Birge ratio; null for one result"),
        ("chance", "probability of at least this chi squared by chance; below 0.05 the results are inconsistent"),
        ("e_n", "normalised error of each result against the reference; missing without one"),
    ];

    public override string Example =>
        """{ "results": [ { "value": 100.012, "u": 0.004 }, { "value": 100.006, "u": 0.006 }, { "value": 100.021, "u": 0.005 } ], "reference": 100.01, "u_reference": 0.003 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        IReadOnlyList<CalcInput> results = input.Objects("results");
        double[] values = [.. results.Select(item => item.Number("value"))];
        double[] uncertainties = [.. results.Select(item => item.Number("u"))];
        WeightedMean mean = WeightedMean.Of(values, uncertainties);
        result.Add("mean", mean.Value)
            .Add("u_internal", mean.InternalUncertainty)
            .Add("u_external", mean.ExternalUncertainty)
            .Add("chi_squared", mean.ChiSquared)
            .Add("degrees_of_freedom", mean.Count - 1)
            .Add("birge_ratio", mean.BirgeRatio)
            .Add("chance", mean.Probability)
            .Step("weights", uncertainties.Select(u => mean.InternalUncertainty * mean.InternalUncertainty / (u * u)));
        if (input.Has("reference"))
        {
            double k = input.Number("k", 2);
            double reference = input.Number("reference");
            double u = input.Number("u_reference", 0);
            result.Add("e_n", values.Zip(uncertainties, (value, own) => NormalizedError.Of(value, k * own, reference, k * u)));
        }
    }
}
