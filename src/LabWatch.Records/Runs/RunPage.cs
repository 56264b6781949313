namespace LabWatch.Records.Runs;

/// <summary>One page of calibration runs.</summary>
/// <param name="Items">The runs.</param>
/// <param name="Next">Cursor of the next page; null on the last.</param>
public sealed record RunPage(IReadOnlyList<RecordedRun> Items, string? Next);
