using LabWatch.Metrology.Statistics;

namespace LabWatch.Service.Calc;

/// <summary>Spikes in a series.</summary>
internal sealed class SpikesCalculator : Calculator
{
    public override string Name => "spikes";

    public override string Summary => "Values that stand out of their neighbours, by the Hampel identifier.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "outlier: |x - median| > threshold s, s = 1.4826 median|x - median| over the value and its neighbours",
        "s is at least the smallest deviation that is assumed",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "F. R. Hampel, J. Am. Stat. Assoc. 69 (1974) 383-393",
        "L. Davies and U. Gather, J. Am. Stat. Assoc. 88 (1993) 782-792",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Numbers("value", "values in the order of time; null for none") with { AllowsGaps = true },
        CalcField.Integer("half_width", "neighbours on each side; 5 where missing", 1, 10_000).Optional(),
        CalcField.Positive("threshold", "number of standard deviations; 3 where missing").Optional(),
        CalcField.NotNegative("least_deviation", "smallest standard deviation to assume, as where the last digit hides the noise; 0 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("count", "number of spikes"),
        ("spikes", "their places in the series, from 1"),
    ];

    public override string Example => """{ "value": [20.01, 20.02, 20.00, 20.01, 23.7, 20.02, 20.01, 19.99, 20.00, 20.02], "half_width": 3 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        double[] values = input.Numbers("value");
        bool[] outliers = new bool[values.Length];
        int count = HampelFilter.Find(values, (int)input.Integer("half_width", 5), input.Number("threshold", 3), input.Number("least_deviation", 0), outliers);
        result.Add("count", count)
            .Add("spikes", Enumerable.Range(0, values.Length).Where(i => outliers[i]).Select(i => i + 1d));
    }
}
