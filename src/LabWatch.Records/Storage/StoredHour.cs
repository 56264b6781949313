using LabWatch.Lab.Time;

namespace LabWatch.Records.Storage;

/// <summary>A source-hour as stored.</summary>
internal sealed record StoredHour(Instant Hour, long Revision);
