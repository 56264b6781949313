using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Readings;

/// <summary>A reading that was refused because its identity already has another value.</summary>
/// <param name="Source">The source.</param>
/// <param name="Arrival">When the refused reading arrived.</param>
/// <param name="Refused">The refused reading.</param>
/// <param name="StoredValue">The value that stays.</param>
public sealed record ReadingConflict(SourceKey Source, Instant Arrival, Reading Refused, double StoredValue);
