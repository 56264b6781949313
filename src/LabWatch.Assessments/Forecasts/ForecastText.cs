using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Forecasts;

/// <summary>A forecast in plain words.</summary>
internal static class ForecastText
{
    public static string Of(DriftForecast forecast)
    {
        string where = double.IsFinite(forecast.Series.SetPointCelsius) ? $" at {VerdictText.Plain(forecast.Series.SetPointCelsius)} degC" : string.Empty;
        string name = TrackedQuantity.NameOf(forecast.Series.Quantity, forecast.Series.Criterion);
        if (!forecast.SlopePerYear.HasValue)
        {
            return $"No trend yet: {Count(forecast.Days.Count)} with decided assessments{where}, and {DriftForecasts.LeastDays} are needed.";
        }

        return string.Join(' ', [Slope(forecast, name, where), .. Crossing(forecast), Chart(forecast)]);
    }

    private static string Slope(DriftForecast forecast, string name, string where)
    {
        Estimate slope = forecast.SlopePerYear;
        double expanded = forecast.CoverageFactor * slope.StandardUncertainty;
        string unit = VerdictText.Of(forecast.Series.Unit);
        string rate = $"{(slope.Value > 0 ? "+" : string.Empty)}{Quantities.Value(slope.Value, expanded)}{unit} a year (U = {Quantities.Significant(expanded)}{unit}, k = {Quantities.Fixed(forecast.CoverageFactor, 2)})";
        string verdict = forecast.IsSignificant ? "more than chance makes" : "no more than chance makes";
        return $"Over {Count(forecast.Days.Count)}{where} {name} moves by {rate}, {verdict}; autocorrelation of the days {Quantities.Fixed(forecast.Trend.Autocorrelation, 2)}, "
            + $"Mann-Kendall probability without a trend {Quantities.Fixed(forecast.MedianSlope!.Value.Test.Probability, 2)}.";
    }

    private static IEnumerable<string> Crossing(DriftForecast forecast)
    {
        if (forecast.Limit is not { } limit)
        {
            yield break;
        }

        string text = $"{Quantities.Significant(limit)}{VerdictText.Of(forecast.Series.Unit)}";
        double newest = Math.Abs(forecast.Days[^1].Value - forecast.Reference);
        Instant last = forecast.Days[^1].At;
        if (newest > limit)
        {
            yield return $"It stands beyond its limit of {text}.";
        }
        else if (forecast.IsSignificant && forecast.Expected is { } expected)
        {
            yield return $"At this rate it reaches its limit of {text} about {Day(expected)} (95 % interval {(forecast.Earliest is { } early && early > last ? Day(early) : "now")} to {(forecast.Latest is { } late ? Day(late) : "later than ten years from now")}).";
        }
        else if (forecast.Earliest is { } earliest)
        {
            yield return $"The limit of {text} is not reached before {Day(earliest)} (95 %); whether at all cannot be told while the trend is no more than chance.";
        }
        else
        {
            yield return $"The limit of {text} is not within reach of ten years.";
        }
    }

    private static string Chart(DriftForecast forecast)
    {
        if (forecast.Chart is not { } chart)
        {
            return $"Control charts begin after {ChartRules.ReferenceDays} days of reference.";
        }

        return chart.Signal == "none"
            ? "The control charts show no lasting change since the reference days."
            : $"The control charts signal a lasting {chart.Signal} since {Day(chart.SignalsSince!.Value)}.";
    }

    private static string Day(Instant instant) => instant.ToDateTimeOffset().ToString("yyyy-MM-dd", System.Globalization.CultureInfo.InvariantCulture);

    private static string Count(int days) => days == 1 ? "1 day" : $"{Quantities.Count(days)} days";
}
