using LabWatch.Lab.Time;

namespace LabWatch.Records.Audit;

/// <summary>Which entries of the audit trail to list, newest first.</summary>
/// <param name="Site">Id of the site.</param>
/// <param name="Count">Entries on the page, 1 to 500.</param>
public sealed record AuditQuery(string Site, int Count)
{
    /// <summary>Only this action; null for all.</summary>
    public string? Action { get; init; }

    /// <summary>Only what this actor did; null for all.</summary>
    public string? Actor { get; init; }

    /// <summary>Only this subject, or, where the text ends in <c>/</c>, every subject that begins with it; null for all.</summary>
    public string? Subject { get; init; }

    /// <summary>Only from this instant on; null for all.</summary>
    public Instant? From { get; init; }

    /// <summary>Only before this instant; null for all.</summary>
    public Instant? To { get; init; }

    /// <summary>Number of the last entry of the page before: only older ones; null for the first page.</summary>
    public long? Before { get; init; }
}
