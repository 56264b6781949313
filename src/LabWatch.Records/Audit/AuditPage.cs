namespace LabWatch.Records.Audit;

/// <summary>One page of the audit trail.</summary>
/// <param name="Items">The entries, newest first.</param>
/// <param name="Next">Number to ask the next page with; null on the last.</param>
/// <param name="Head">End of the chain when the page was read; null while it is empty.</param>
public sealed record AuditPage(IReadOnlyList<AuditEntry> Items, long? Next, AuditHead? Head);
