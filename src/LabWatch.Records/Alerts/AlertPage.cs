using LabWatch.Lab.Alerts;

namespace LabWatch.Records.Alerts;

/// <summary>One page of alerts.</summary>
/// <param name="Items">The alerts.</param>
/// <param name="Next">Cursor of the next page; null on the last.</param>
public sealed record AlertPage(IReadOnlyList<Alert> Items, string? Next);
