namespace LabWatch.Readings;

/// <summary>What became of the readings of one append.</summary>
/// <param name="Accepted">Readings newly stored.</param>
/// <param name="Duplicates">Readings that were there already with the same value.</param>
/// <param name="Conflicts">Readings refused because another value stands for their identity.</param>
public sealed record AppendResult(int Accepted, int Duplicates, IReadOnlyList<ReadingConflict> Conflicts);
