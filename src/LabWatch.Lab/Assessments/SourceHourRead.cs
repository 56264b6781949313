using LabWatch.Lab.Time;

namespace LabWatch.Lab.Assessments;

/// <summary>A source-hour that an assessment read, in the revision that it read.</summary>
/// <param name="Hour">Start of the hour.</param>
/// <param name="Revision">Revision of the hour at the time of reading: it grows with every reading that becomes durable in that hour.</param>
public readonly record struct SourceHourRead(Instant Hour, long Revision);
