using LabWatch.Metrology.Statistics;

namespace LabWatch.Service.Calc;

/// <summary>Trend of a long record and the date at which it reaches a limit.</summary>
internal sealed class TrendCalculator : Calculator
{
    private const double SecondsPerDay = 86_400;

    public override string Name => "trend";

    public override string Summary => "Trend of a long record (Theil-Sen, Mann-Kendall), and when it will reach a limit, with an interval.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "Theil-Sen slope: median of the slopes of all pairs of values further apart than the correlation time; interval from the variance of S",
        "Mann-Kendall: S = rising less falling pairs; Z = (S -+ 1)/sqrt(Var S) with ties",
        "crossing: times x with (limit - mean - b x)^2 <= k^2 (u(mean)^2 + u(b)^2 x^2), b the least-squares slope with autocorrelated noise, k of Student's t",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "P. K. Sen, J. Am. Stat. Assoc. 63 (1968) 1379-1389; H. B. Mann, Econometrica 13 (1945) 245-259",
        "R. O. Gilbert, Statistical Methods for Environmental Pollution Monitoring, 1987, chapter 16",
        "E. C. Fieller, J. R. Stat. Soc. B 16 (1954) 175-185",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Numbers("value", "values in any one unit, in the order of time") with { MinimumItems = 3, MaximumItems = 100_000 },
        .. CalcTimes.Fields,
        CalcField.NotNegative("correlation_s", "correlation time of the values, seconds; 0 where missing").Optional() with { Maximum = 1e12 },
        CalcField.Number("limit", "a limit in the unit of the values").Optional(),
        CalcField.Number("probability", "probability of the intervals; 0.95 where missing").Optional() with { Minimum = 0.5, Maximum = 0.9999 },
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("slope_per_day", "Theil-Sen slope per day; null for fewer than three values after thinning"),
        ("slope_lower_per_day", "lower end of its interval"),
        ("slope_upper_per_day", "upper end of its interval"),
        ("mann_kendall_s", "rising less falling pairs"),
        ("mann_kendall_z", "the same in standard deviations, with continuity correction"),
        ("p_no_trend", "probability of so large a Z without a trend, two-sided"),
        ("values_used", "values after thinning"),
        ("crossing_s", "time at which the line reaches the limit, on the clock of the input; null where it does not"),
        ("crossing_earliest_s", "earliest time of the interval; null where it never reaches the limit"),
        ("crossing_latest_s", "latest time of the interval; null where it may never reach the limit"),
    ];

    public override string Example =>
        """{ "value": [1.02, 1.00, 1.05, 1.07, 1.04, 1.10, 1.09, 1.13, 1.12, 1.16], "step_s": 86400, "limit": 1.5 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        double[] values = input.Numbers("value");
        if (CalcTimes.Read(input, values.Length) is not { } times) return;
        double probability = input.Number("probability", 0.95);
        var trend = TheilSenTrend.Of(times, values, (long)(input.Number("correlation_s", 0) * 1e6), probability);
        result.Add("slope_per_day", trend.SlopePerDay)
            .Add("slope_lower_per_day", trend.LowerPerDay)
            .Add("slope_upper_per_day", trend.UpperPerDay)
            .Add("mann_kendall_s", trend.Test.S)
            .Add("mann_kendall_z", trend.Test.Z)
            .Add("p_no_trend", trend.Test.Probability)
            .Add("values_used", trend.Count)
            .Step("variance_of_s", trend.Test.Variance);
        if (!input.Has("limit")) return;
        var crossing = LimitCrossing.Forecast(times, values, input.Number("limit"), probability);
        result.Add("crossing_s", Seconds(crossing.ExpectedMicros))
            .Add("crossing_earliest_s", Seconds(crossing.EarliestMicros))
            .Add("crossing_latest_s", Seconds(crossing.LatestMicros))
            .Step("least_squares_slope_per_day", crossing.Trend.SlopePerHour.Value * SecondsPerDay / 3600)
            .Step("u_least_squares_slope_per_day", crossing.Trend.SlopePerHour.StandardUncertainty * SecondsPerDay / 3600)
            .Step("neighbour_correlation", crossing.Trend.Autocorrelation);
    }

    private static double Seconds(long? micros) => micros is { } value ? value / 1e6 : double.NaN;
}
