using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.SettledParts;

/// <summary>
/// Standard error of a slope over a short window. Twenty minute means cannot show how long their noise lasts, so the noise and its correlation come from the straight line through the
/// lead-in, while the set point is unchanged: u^2 = s^2 x'Rx/(sum x^2)^2 with R = r^|i - j|, degrees of freedom n_eff - 2 of the longer line. During an approach the longer line is none;
/// there u = s sqrt(12/n)/T from the white noise of the readings.
/// </summary>
internal static class SlopeError
{
    public static Estimate Of(LinearTrend trend, TemperatureSeries minutes, TemperatureSeries within, StabilityEvidence evidence)
    {
        double slope = trend.SlopePerHour.Value;
        if (!double.IsFinite(slope))
        {
            return Estimate.None;
        }

        double setPoint = evidence.SetPoint.Celsius;
        if (evidence.SetPoint.ChangedAt is not null || Math.Abs(evidence.Before.MeanCelsius - setPoint) > StabilityObstacles.AtTemperatureKelvin(setPoint))
        {
            double white = OfWhiteNoise(within, evidence.Window.Duration);
            return double.IsFinite(white) ? new(slope, white, within.Count - 2) : trend.SlopePerHour;
        }

        TemperatureSeries before = evidence.Before.MinuteMeans();
        LinearTrend longer = LinearTrend.Fit(before.TimeMicroseconds.Span, before.Celsius.Span);
        return new(slope, longer.NoiseDeviation * Sensitivity(minutes.TimeMicroseconds.Span, longer.Autocorrelation, longer.LagMicros), Math.Max(1, longer.EffectiveSampleSize - 2));
    }

    /// <summary>Standard error of the slope over a time, kelvin per hour, from the white noise of the readings alone; NaN from too few.</summary>
    public static double OfWhiteNoise(TemperatureSeries readings, TimeSpan over) =>
        ReadingNoise.Deviation(readings.Celsius.Span, 0, 0) * Math.Sqrt(12.0 / readings.Count) / over.TotalHours;

    /// <summary>sqrt(x'Rx)/sum x^2 with x in hours from their mean.</summary>
    private static double Sensitivity(ReadOnlySpan<long> times, double correlation, double lagMicroseconds)
    {
        double mean = 0;
        foreach (long time in times)
        {
            mean += (time - times[0]) / (double)times.Length;
        }

        double squares = 0, correlated = 0;
        for (int i = 0; i < times.Length; i++)
        {
            double x = (times[i] - times[0] - mean) / 3.6e9;
            squares += x * x;
            for (int j = 0; j < times.Length; j++)
            {
                correlated += x * ((times[j] - times[0] - mean) / 3.6e9) * (i == j ? 1 : Math.Pow(correlation, Math.Abs(times[i] - times[j]) / lagMicroseconds));
            }
        }

        return Math.Sqrt(Math.Max(0, correlated)) / squares;
    }
}
