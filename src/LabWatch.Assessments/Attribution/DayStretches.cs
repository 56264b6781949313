using LabWatch.Assessments.Forecasts;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Attribution;

/// <summary>The reference days and the recent days of one series.</summary>
/// <param name="Series">The series.</param>
/// <param name="Reference">The first days, at most as many as the control charts take.</param>
/// <param name="Recent">The last days.</param>
internal sealed record DayStretches(DriftForecast Series, IReadOnlyList<DayMean> Reference, IReadOnlyList<DayMean> Recent)
{
    /// <summary>Days up to the newest of a source that count as recent.</summary>
    public static TimeSpan RecentSpan { get; } = TimeSpan.FromDays(3);

    /// <summary>Reference days that a change needs at least.</summary>
    public const int LeastReferenceDays = 2;

    /// <summary>Cuts a series.</summary>
    /// <param name="series">The series.</param>
    /// <param name="newest">The newest day of the source.</param>
    public static DayStretches Of(DriftForecast series, Instant newest)
    {
        DayMean[] recent = [.. series.Days.Where(day => newest - day.At < RecentSpan)];
        return new(series, [.. series.Days.Take(Math.Min(ChartRules.ReferenceDays, series.Days.Count - recent.Length))], recent);
    }

    /// <summary>Mean of the recent days.</summary>
    public double RecentMean => Recent.Average(day => day.Value);

    /// <summary>Mean of the reference days.</summary>
    public double ReferenceMean => Reference.Average(day => day.Value);

    /// <summary>Standard deviation of a day about the means of its set point, from the reference days of several series; NaN below three degrees of freedom.</summary>
    public static double Scatter(IEnumerable<DayStretches> alike)
    {
        double squares = 0;
        int freedom = 0;
        foreach (DayStretches stretches in alike.Where(candidate => candidate.Reference.Count > 1))
        {
            double mean = stretches.ReferenceMean;
            squares += stretches.Reference.Sum(day => (day.Value - mean) * (day.Value - mean));
            freedom += stretches.Reference.Count - 1;
        }

        return freedom >= 3 ? Math.Sqrt(squares / freedom) : double.NaN;
    }
}
