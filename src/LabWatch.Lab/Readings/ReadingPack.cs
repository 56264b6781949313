using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Lab.Readings;

/// <summary>Readings of one source that arrived together in one message. They are made durable together or not at all.</summary>
/// <param name="Source">The source that all readings belong to.</param>
/// <param name="Arrival">When the message reached this service.</param>
/// <param name="Readings">The readings; times may repeat across channels and may be in any order.</param>
public sealed record ReadingPack(SourceKey Source, Instant Arrival, IReadOnlyList<Reading> Readings);
