using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Readiness;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Criteria.SettledParts;

/// <summary>When a source will have settled if it goes on as in the window, from its end.</summary>
/// <param name="TimeConstant">Time constant of the approach.</param>
/// <param name="Earliest">Shortest time.</param>
/// <param name="Latest">Longest time.</param>
internal sealed record SettlingForecast(TimeSpan TimeConstant, TimeSpan Earliest, TimeSpan Latest)
{
    private const double CoverageFactor = 2;
    private static readonly TimeSpan Farthest = TimeSpan.FromHours(24);

    /// <summary>The forecast; null where the slopes do not show an approach that ends.</summary>
    /// <param name="within">Temperatures of the window.</param>
    /// <param name="window">The window.</param>
    /// <param name="setPoint">Set point, degree Celsius.</param>
    /// <param name="tolerance">How near to it is near enough, kelvin.</param>
    /// <param name="limitKelvinPerHour">Slope below which it has settled; NaN where there is no limit.</param>
    public static SettlingForecast? Of(TemperatureSeries within, TimeWindow window, double setPoint, double tolerance, double limitKelvinPerHour)
    {
        // Half of the readings in half of the time: the error of a slope is the square root of eight times that of the whole.
        TimeSpan half = window.Duration / 2;
        LinearTrend first = Fit(within.Slice(new(window.Start, window.Start + half))), second = Fit(within.Slice(new(window.Start + half, window.End)));
        double s1 = Math.Abs(first.SlopePerHour.Value), s2 = Math.Abs(second.SlopePerHour.Value);
        if (!(limitKelvinPerHour > 0) || !(s1 > s2) || !(s2 > 0) || Math.Sign(first.SlopePerHour.Value) != Math.Sign(second.SlopePerHour.Value))
        {
            return null;
        }

        double u = CoverageFactor * SlopeError.OfWhiteNoise(within, window.Duration) * Math.Sqrt(8);
        if (double.IsNaN(u))
        {
            return null;
        }

        double tau = half.TotalHours / Math.Log(s1 / s2);
        double earliest = Until(s1 + u, Math.Max(s2 - u, 0), half, limitKelvinPerHour), latest = Until(s1 - u, s2 + u, half, limitKelvinPerHour);
        Approach? approach = Approach.Of(within, setPoint, tolerance);
        double nearest = approach?.Earliest.TotalHours ?? 0, farthest = approach?.Latest.TotalHours ?? 0;
        return Math.Max(latest, farthest) <= Farthest.TotalHours
            ? new(TimeSpan.FromHours(tau), TimeSpan.FromHours(Math.Max(earliest, nearest)), TimeSpan.FromHours(Math.Max(latest, farthest)))
            : null;
    }

    /// <summary>Hours from the end of the window until the slope is within the limit; infinite where it does not fall.</summary>
    private static double Until(double first, double second, TimeSpan half, double limit)
    {
        if (second <= limit)
        {
            return 0;
        }

        if (first <= second)
        {
            return double.PositiveInfinity;
        }

        // The slope of a half belongs to its middle, a quarter of the window before its end.
        double tau = half.TotalHours / Math.Log(first / second);
        return Math.Max(0, (tau * Math.Log(second / limit)) - (half.TotalHours / 2));
    }

    private static LinearTrend Fit(TemperatureSeries series)
    {
        TemperatureSeries minutes = series.MinuteMeans();
        return LinearTrend.Fit(minutes.TimeMicroseconds.Span, minutes.Celsius.Span);
    }
}
