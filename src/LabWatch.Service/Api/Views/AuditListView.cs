namespace LabWatch.Service.Api.Views;

/// <summary>One page of the audit trail.</summary>
/// <param name="Items">The entries, newest first.</param>
/// <param name="Next">Cursor of the next page; null on the last.</param>
/// <param name="Head">End of the chain now; null while it is empty.</param>
internal sealed record AuditListView(IReadOnlyList<AuditEntryView> Items, string? Next, AuditHeadView? Head);
