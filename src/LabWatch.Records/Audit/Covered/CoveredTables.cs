using LabWatch.Records.Storage.Rows;

namespace LabWatch.Records.Audit.Covered;

/// <summary>
/// Every table that the audit trail covers. To cover a table: add a line here, and call <see cref="AuditChain.CoverAsync"/> for each row
/// that is added (or changed) in the transaction that writes it. No two tables may share a form of subject.
/// </summary>
internal static class CoveredTables
{
    /// <summary>The tables.</summary>
    public static IReadOnlyList<CoveredTable> All { get; } =
    [
        CoveredTable.AppendOnly<AssessmentRow>("assessment/{id}"),
        CoveredTable.Changing<AlertRow>(
            "alert/{id}",
            "priority", "state", "headline", "detail", "value", "limit_value", "unit", "returned_at", "acknowledged_at", "acknowledged_by", "acknowledge_note", "transition"),
        CoveredTable.AppendOnly<AlertTransitionRow>("alert/{alert_id}/{sequence}"),
        CoveredTable.AppendOnly<LabImportRow>("lab-import/{sequence}"),
        CoveredTable.AppendOnly<RevisionRow>("record/{kind}/{id}@{revision}"),
        CoveredTable.AppendOnly<RunStepRow>("run/{run_id}/{number}"),
        CoveredTable.AppendOnly<AccountRow>("account/{name}/{revision}"),
        CoveredTable.Changing<TokenRow>("token/{id}", "last_used_at"),
    ];

    /// <summary>The description of a row's table.</summary>
    /// <exception cref="ArgumentException">The trail does not cover rows of this type.</exception>
    public static CoveredTable Of(Type row) =>
        All.FirstOrDefault(table => table.Row == row) ?? throw new ArgumentException($"The audit trail does not cover {row.Name}.", nameof(row));
}
