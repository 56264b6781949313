using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Readiness;

/// <summary>
/// How fast a source nears its set point, and when it will be there if it goes on as lately: at the earliest in a straight line at the
/// fastest rate that it may have now, at the latest as an exponential that ends at the set point and begins with the slowest. A controlled furnace comes
/// between the two (common practice, no source); one whose rate may be zero may never come.
/// </summary>
/// <param name="KelvinPerHour">Rate towards the set point in the later half of the stretch, positive.</param>
/// <param name="Within">The stretch that the rate was taken from.</param>
/// <param name="Earliest">Shortest time until it is there.</param>
/// <param name="Latest">Longest time until it is there.</param>
internal sealed record Approach(double KelvinPerHour, TimeSpan Within, TimeSpan Earliest, TimeSpan Latest)
{
    private const int LeastReadings = 12;

    /// <summary>Beyond this nothing is told.</summary>
    private static readonly TimeSpan Farthest = TimeSpan.FromHours(24);

    private static readonly TimeSpan Longest = TimeSpan.FromMinutes(10);
    private static readonly TimeSpan Shortest = TimeSpan.FromMinutes(2);

    /// <summary>Judges recent temperatures.</summary>
    /// <param name="temperatures">Temperatures of the reference since the set point is as it is.</param>
    /// <param name="setPointCelsius">The set point.</param>
    /// <param name="toleranceKelvin">How near is near enough.</param>
    /// <returns>Null where it cannot be told.</returns>
    public static Approach? Of(TemperatureSeries temperatures, double setPointCelsius, double toleranceKelvin)
    {
        if (temperatures.Count < LeastReadings)
        {
            return null;
        }

        Instant last = new(temperatures.TimeMicroseconds.Span[^1]);
        TemperatureSeries lately = temperatures.Slice(new TimeWindow(last - Longest, new Instant(last.Microseconds + 1)));
        if (lately.Count < LeastReadings || last - new Instant(lately.TimeMicroseconds.Span[0]) < Shortest)
        {
            return null;
        }

        double celsius = lately.Celsius.Span[^1];
        (double rate, double slowest, double fastest) = Rates(lately, Math.Sign(setPointCelsius - celsius));
        double remaining = Math.Abs(setPointCelsius - celsius);
        if (!(slowest > 0) || !(remaining > toleranceKelvin))
        {
            return null;
        }

        double earliest = (remaining - toleranceKelvin) / fastest, latest = remaining / slowest * Math.Log(remaining / toleranceKelvin);
        return latest < Farthest.TotalHours
            ? new(rate, last - new Instant(lately.TimeMicroseconds.Span[0]), TimeSpan.FromHours(earliest), TimeSpan.FromHours(latest))
            : null;
    }

    /// <summary>
    /// The rate over the later half, and between which rates it lies now: that of the later half, and what the change since the earlier half makes of it by the last
    /// reading, each with what the noise of the readings allows (k = 2; a slope over n readings in a time T has u = s sqrt(12/n)/T).
    /// </summary>
    private static (double Rate, double Slowest, double Fastest) Rates(TemperatureSeries lately, double direction)
    {
        ReadOnlySpan<long> times = lately.TimeMicroseconds.Span;
        ReadOnlySpan<double> celsius = lately.Celsius.Span;
        int half = times.Length / 2;
        double earlier = direction * LinearTrend.Fit(times[..half], celsius[..half]).SlopePerHour.Value;
        double later = direction * LinearTrend.Fit(times[half..], celsius[half..]).SlopePerHour.Value;
        double now = later + ((later - earlier) / 2);
        double noise = ReadingNoise.Deviation(celsius, 0, 0);
        double u = (double.IsNaN(noise) ? 0 : noise) * Math.Sqrt(12.0 / half) / ((times[^1] - times[half]) / 3.6e9);
        return (later, Math.Min(later - (2 * u), now - (2 * 1.6 * u)), Math.Max(later + (2 * u), now + (2 * 1.6 * u)));
    }
}
