using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Forecasts;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Power;

/// <summary>
/// The power of the monitoring at its present noise, schedule and limits, by <see cref="DetectableDrift"/>: one check a day and series, 95 % power, 0.1 false alarms a year for a
/// criterion of a source, shared by its series. What all checks share (certificate, coating as stated) is no noise: it hides no change.
/// </summary>
public static class MonitoringPower
{
    private const double DaysPerYear = 365.25;
    private const int LastDays = 5;

    /// <summary>One row a series, in the order of the forecasts.</summary>
    public static IReadOnlyList<DriftPower> Of(IReadOnlyList<DriftForecast> forecasts)
    {
        ArgumentNullException.ThrowIfNull(forecasts);
        return [.. forecasts.Select(forecast => One(forecast, forecasts.Count(other => other.Series.Criterion == forecast.Series.Criterion)))];
    }

    private static DriftPower One(DriftForecast forecast, int alike)
    {
        int days = forecast.Days.Count;
        double span = days > 1 ? (forecast.Days[^1].At - forecast.Days[0].At).TotalDays : double.NaN, noise = forecast.Trend.NoiseDeviation;
        double perYear = (days - 1) / span * DaysPerYear;
        double? margin = forecast.Limit is { } limit ? limit - Math.Abs(forecast.Days.TakeLast(LastDays).Average(day => day.Value) - forecast.Reference) : null;
        if (!(noise > 0) || !double.IsFinite(noise) || !double.IsFinite(perYear))
        {
            return new(
                forecast.Series, forecast.Band, days, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, margin, PowerVerdict.TooFewDays,
                $"Too few days to know the noise: {Quantities.Count(days)}, and {DriftForecasts.LeastDays} that scatter are needed.");
        }

        // The mean of n correlated days is known as well as that of n (1 - r)/(1 + r) independent ones.
        double r = Math.Min(0.95, forecast.Trend.Autocorrelation), inflated = Math.Sqrt((1 + r) / (1 - r));
        DetectableDrift drift = new(noise, perYear, Bands: alike);
        double next = drift.ByFormula(1), five = Math.Min(next, drift.ByFormula(5) * inflated), twenty = Math.Min(five, drift.ByFormula(20) * inflated);
        PowerVerdict verdict = margin switch
        {
            null => PowerVerdict.NoLimit,
            { } distance when next <= distance => PowerVerdict.SeenAtOnce,
            { } distance when five <= distance => PowerVerdict.SeenWithinFive,
            { } distance when twenty <= distance => PowerVerdict.SeenWithinTwenty,
            _ => PowerVerdict.CannotBeSeen,
        };
        return new(forecast.Series, forecast.Band, days, noise, perYear, next, five, twenty, margin, verdict, Text(forecast, next, five, twenty, margin, verdict));
    }

    private static string Text(DriftForecast forecast, double next, double five, double twenty, double? margin, PowerVerdict verdict)
    {
        string unit = VerdictText.Of(forecast.Series.Unit);
        string sizes = $"A lasting shift of {Quantities.Significant(next)}{unit} is found at the next check, of {Quantities.Significant(five)}{unit} within five and of {Quantities.Significant(twenty)}{unit} within twenty (95 %).";
        return verdict switch
        {
            PowerVerdict.NoLimit => sizes + " No limit applies.",
            PowerVerdict.SeenAtOnce => $"{sizes} A shift of {Quantities.Significant(margin!.Value)}{unit}, which would reach the limit, is found at the next check.",
            PowerVerdict.SeenWithinFive => $"{sizes} A shift of {Quantities.Significant(margin!.Value)}{unit}, which would reach the limit, is found within five checks.",
            PowerVerdict.SeenWithinTwenty => $"{sizes} A shift of {Quantities.Significant(margin!.Value)}{unit}, which would reach the limit, is found within twenty checks only.",
            _ when margin <= 0 => sizes + " The last days stand beyond the limit already.",
            _ => $"{sizes} The limit cannot be seen: a shift of {Quantities.Significant(margin!.Value)}{unit} reaches it, and is not found reliably within twenty checks. Check more often, lower the noise, or widen the limit.",
        };
    }
}
