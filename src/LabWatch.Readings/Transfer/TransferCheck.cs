using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Transfer;

/// <summary>What a comparison of two stores found.</summary>
/// <param name="Hours">Hours compared: all that the one side has.</param>
/// <param name="Readings">Readings in them.</param>
/// <param name="Different">Hours that are not the same on the other side.</param>
/// <param name="OthersHours">Hours that only the other side has.</param>
public sealed record TransferCheck(long Hours, long Readings, IReadOnlyList<(SourceKey Source, Instant Hour)> Different, long OthersHours);
