using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Readings;

/// <summary>The raw readings of a source in a window, with the revisions of the hours they came from.</summary>
/// <param name="Source">The source.</param>
/// <param name="Window">The window asked for.</param>
/// <param name="Series">One series a channel that has readings in the window, in ordinal order of channel id.</param>
/// <param name="Hours">Revisions of the hours touched, taken in the same read.</param>
public sealed record ReadingWindow(SourceKey Source, TimeWindow Window, IReadOnlyList<ReadingSeries> Series, IReadOnlyList<SourceHourRead> Hours)
{
    /// <summary>The series of a channel; null where it has no readings in the window.</summary>
    public ReadingSeries? Find(string channel) => Series.FirstOrDefault(series => string.Equals(series.Channel, channel, StringComparison.Ordinal));
}
