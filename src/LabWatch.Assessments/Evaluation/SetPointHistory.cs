using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>The set point over a span.</summary>
/// <param name="Celsius">The set point at the end of the span; NaN where it has no reading.</param>
/// <param name="LastReading">Time of its last reading; null where there is none.</param>
/// <param name="ChangedAt">First reading of the present set point, where an earlier one differed; null where it did not change.</param>
/// <param name="FormerCelsius">The set point before the change; NaN where it did not change.</param>
public sealed record SetPointHistory(double Celsius, Instant? LastReading, Instant? ChangedAt, double FormerCelsius)
{
    /// <summary>Two set points nearer to each other than this are one: converters and displays round. Kelvin.</summary>
    public const double SameWithinKelvin = 0.01;

    /// <summary>Reads the set point out of a channel's readings; readings without a value are passed over.</summary>
    public static SetPointHistory Of(ReadingSeries? series)
    {
        SetPointHistory history = new(double.NaN, null, null, double.NaN);
        for (int i = (series?.Count ?? 0) - 1; i >= 0; i--)
        {
            double celsius = series!.Values.Span[i];
            if ((series.Qualities.Span[i] & ReadingQuality.NoValue) != 0 || !double.IsFinite(celsius))
            {
                continue;
            }

            Instant time = new(series.TimeMicroseconds.Span[i]);
            if (history.LastReading is null)
            {
                history = new(celsius, time, time, double.NaN);
            }
            else if (Math.Abs(celsius - history.Celsius) <= SameWithinKelvin)
            {
                history = history with { ChangedAt = time };
            }
            else
            {
                return history with { FormerCelsius = celsius };
            }
        }

        return history with { ChangedAt = null };
    }
}
