namespace LabWatch.Readings.Head;

/// <summary>One unsealed part as it was at one commit.</summary>
/// <param name="Hour">Start of the hour.</param>
/// <param name="Part">Number of the part.</param>
/// <param name="Readings">Readings published in it.</param>
/// <param name="Columns">The columns asked for.</param>
internal sealed record HeadSlice(long Hour, int Part, int Readings, IReadOnlyList<(string Channel, ColumnSnapshot Column)> Columns);
