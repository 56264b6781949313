using LabWatch.Metrology.Statistics;

namespace LabWatch.Service.Calc;

/// <summary>Whether a series has become steady.</summary>
internal sealed class SteadyStateCalculator : Calculator
{
    private const double Smallest = 0.01;

    public override string Name => "steady-state";

    public override string Summary => "R-statistic of a series: near 1 while it is steady, larger while it moves.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "x_f = l1 x + (1 - l1) x_f; v2 = l2 (x - x_f before)^2 + (1 - l2) v2; d2 = l3 (x - x before)^2 + (1 - l3) d2; R = (2 - l1) v2/d2",
        "both mean squares start at zero and x_f at the first value",
        "critical value: quantile of R for independent normal values, by a seeded simulation",
        "values must be independent: thin them beyond their correlation time",
    ];

    public override IReadOnlyList<string> Source { get; } = ["S. Cao and R. R. Rhinehart, J. Process Control 5 (1995) 363-374"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Numbers("value", "values in the order of time, thinned beyond their correlation time") with { MinimumItems = 2 },
        CalcField.Number("l1", "factor of the filter of the value; 0.2 where missing").Optional() with { Minimum = Smallest, Maximum = 1 },
        CalcField.Number("l2", "factor of the filter of the squared distance; 0.1 where missing").Optional() with { Minimum = Smallest, Maximum = 1 },
        CalcField.Number("l3", "factor of the filter of the squared difference; 0.1 where missing").Optional() with { Minimum = Smallest, Maximum = 1 },
        CalcField.Positive("confidence", "probability that a steady series stays below the critical value; 0.95 where missing").Optional() with { Maximum = 0.99 },
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("r", "R after the last value; null where all values are equal"),
        ("critical_r", "the value that R of a steady series stays below with the given confidence"),
        ("steady", "whether R is not above it"),
        ("r_series", "R after each value"),
    ];

    public override string Example => """{ "value": [19.2, 19.6, 19.9, 20.05, 20.02, 19.98, 20.01, 20.03, 19.97, 20.0, 20.02, 19.99] }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        double l1 = input.Number("l1", 0.2);
        double l2 = input.Number("l2", 0.1);
        double l3 = input.Number("l3", 0.1);
        RStatistic statistic = new(l1, l2, l3);
        List<double> series = [];
        foreach (double value in input.Numbers("value"))
        {
            statistic.Add(value);
            series.Add(statistic.Ratio);
        }

        double critical = RStatisticDistribution.Of(l1, l2, l3).Quantile(input.Number("confidence", 0.95));
        result.Add("r", statistic.Ratio)
            .Add("critical_r", critical)
            .Add("steady", statistic.Ratio <= critical)
            .Add("r_series", series);
    }
}
