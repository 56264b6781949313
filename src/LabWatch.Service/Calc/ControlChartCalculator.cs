using LabWatch.Metrology.Statistics;

namespace LabWatch.Service.Calc;

/// <summary>Control charts of standardised residuals.</summary>
internal sealed class ControlChartCalculator : Calculator
{
    private const string Ewma = "ewma";
    private const string Cusum = "cusum";

    public override string Name => "control-chart";

    public override string Summary => "Exponentially weighted moving average or cumulative sums of independent standardised residuals, with the average run lengths of the chart.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "ewma: z = lambda x + (1 - lambda) z, from 0; signal beyond limit sqrt(lambda/(2 - lambda))",
        "cusum: upper = max(0, upper + x - reference), lower = max(0, lower - x - reference); signal above the interval",
        "average run length L(u) = 1 + L(floor) F(floor | u) + integral of L(y) f(y | u), solved on 160 Gauss-Legendre nodes",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "ISO 7870-6:2016; J. M. Lucas and M. S. Saccucci, Technometrics 32 (1990) 1-12",
        "ISO 7870-4:2021; E. S. Page, Biometrika 41 (1954) 100-115",
        "S. V. Crowder, Technometrics 29 (1987) 401-407",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Choice("chart", "kind of chart", Ewma, Cusum),
        CalcField.Numbers("residual", "independent residuals in standard deviations, in the order of time; null for none; only the run lengths where missing").Optional() with { AllowsGaps = true },
        CalcField.Positive("lambda", "ewma: weight of the newest value; 0.2 where missing").Optional() with { Maximum = 1 },
        CalcField.Positive("limit", "ewma: limits in standard deviations of the average; 3 where missing").Optional() with { Maximum = 10 },
        CalcField.Positive("reference", "cusum: reference value, half of the shift to be found; 0.5 where missing").Optional() with { Maximum = 10 },
        CalcField.Positive("interval", "cusum: decision interval; 5 where missing").Optional() with { Maximum = 30 },
        CalcField.Number("shift", "shift of the mean, in standard deviations, for the second run length; 1 where missing").Optional() with { Minimum = -10, Maximum = 10 },
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("chart_limit", "distance of the limits from zero, in standard deviations of a residual"),
        ("average", "ewma: the average after each residual"),
        ("upper", "cusum: the sum for an increase after each residual"),
        ("lower", "cusum: the sum for a decrease, positive, after each residual"),
        ("first_signal", "number of the first residual that signals, from 1; null where none does"),
        ("run_length_without_shift", "mean number of residuals until a false signal"),
        ("run_length_with_shift", "mean number until a signal with the shift, there from the start"),
    ];

    public override string Example => """{ "chart": "ewma", "residual": [0.2, -0.4, 0.9, 1.6, 1.1, 2.2, 1.4, 1.9], "lambda": 0.2, "limit": 2.86, "shift": 1 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        double shift = input.Number("shift", 1);
        double[] residuals = input.Numbers("residual");
        if (string.Equals(input.Text("chart"), Ewma, StringComparison.Ordinal))
        {
            Average(residuals, input.Number("lambda", 0.2), input.Number("limit", 3), shift, result);
        }
        else
        {
            Sums(residuals, input.Number("reference", 0.5), input.Number("interval", 5), shift, result);
        }
    }

    private static void Average(double[] residuals, double lambda, double limit, double shift, CalcResult result)
    {
        EwmaChart chart = new(lambda, limit);
        double[] averages = new double[residuals.Length];
        int? first = null;
        for (int i = 0; i < residuals.Length; i++)
        {
            chart.Add(residuals[i]);
            averages[i] = chart.Average;
            first ??= chart.Signals ? i + 1 : null;
        }

        Finish(result.Add("chart_limit", chart.Limit).Add("average", averages), first, RunLength.OfEwma(lambda, limit, 0), RunLength.OfEwma(lambda, limit, shift));
    }

    private static void Sums(double[] residuals, double reference, double interval, double shift, CalcResult result)
    {
        CusumChart chart = new(reference, interval);
        double[] upper = new double[residuals.Length];
        double[] lower = new double[residuals.Length];
        int? first = null;
        for (int i = 0; i < residuals.Length; i++)
        {
            chart.Add(residuals[i]);
            (upper[i], lower[i]) = (chart.Upper, chart.Lower);
            first ??= chart.SignalsIncrease || chart.SignalsDecrease ? i + 1 : null;
        }

        Finish(
            result.Add("chart_limit", interval).Add("upper", upper).Add("lower", lower),
            first,
            RunLength.OfTwoSidedCusum(reference, interval, 0),
            RunLength.OfTwoSidedCusum(reference, interval, shift));
    }

    private static void Finish(CalcResult result, int? first, double without, double with) => result
        .Add("first_signal", first ?? double.NaN)
        .Add("run_length_without_shift", without)
        .Add("run_length_with_shift", with);
}
