using LabWatch.Lab.Identity;

namespace LabWatch.Records.Alerts;

/// <summary>Which alerts to list.</summary>
/// <param name="Source">Only this source; null for all.</param>
/// <param name="OpenOnly">Whether to leave out those that are normal.</param>
/// <param name="After">Cursor from the page before; null for the first page.</param>
/// <param name="Count">Rows on the page, 1 to 500.</param>
public sealed record AlertQuery(SourceKey? Source, bool OpenOnly, string? After, int Count);
