using LabWatch.Lab.Identity;

namespace LabWatch.Records.Runs;

/// <summary>Which calibration runs to list, latest start first.</summary>
/// <param name="Source">Only of this source; null for all.</param>
/// <param name="OpenOnly">Whether to leave out those that ended or were cancelled.</param>
/// <param name="After">Cursor from the page before; null for the first page.</param>
/// <param name="Count">Rows on the page, 1 to 500.</param>
public sealed record RunQuery(SourceKey? Source, bool OpenOnly, string? After, int Count);
