using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Metadata;

namespace LabWatch.Records.Storage;

/// <summary>Keys, indexes and names of the tables.</summary>
internal static class RecordsModel
{
    public static void Build(ModelBuilder model)
    {
        Assessments(model);
        Alerts(model);
        model.Entity<PositionRow>(table => table.ToTable("positions").HasKey(row => new { row.Site, row.Reader }));
        model.Entity<LabImportRow>(table => table.ToTable("lab_imports").HasKey(row => new { row.Site, row.Sequence }));
        model.Entity<AuditEntryRow>(table => table.ToTable("audit_entries").HasKey(row => new { row.Site, row.Sequence }));
        Lab(model);
        People(model);
        NameColumns(model);
    }

    private static void Lab(ModelBuilder model)
    {
        model.Entity<RevisionRow>(table =>
        {
            table.ToTable("revisions").HasKey(row => new { row.Site, row.Kind, row.Id, row.Revision });
            table.HasIndex(row => new { row.Site, row.Sequence }).IsUnique();
        });
        model.Entity<RunRow>(table =>
        {
            table.ToTable("runs").HasKey(row => row.Id);
            table.HasIndex(row => row.Number).IsUnique();
            table.HasIndex(row => new { row.StartedAt, row.Number });
            table.HasIndex(row => new { row.Site, row.Source }).IsUnique().HasFilter("ended_at IS NULL AND cancelled_at IS NULL");
        });
        model.Entity<RunStepRow>(table =>
        {
            table.ToTable("run_steps").HasKey(row => new { row.RunId, row.Number });
            table.HasIndex(row => new { row.Site, row.By, row.RequestKey }).IsUnique().HasFilter("request_key IS NOT NULL");
        });
    }

    private static void People(ModelBuilder model)
    {
        model.Entity<AccountRow>(table => table.ToTable("accounts").HasKey(row => new { row.Site, row.Name, row.Revision }));
        model.Entity<AccountUseRow>(table => table.ToTable("account_use").HasKey(row => new { row.Site, row.Name }));
        model.Entity<SessionRow>(table =>
        {
            table.ToTable("sessions").HasKey(row => row.Id);
            table.HasIndex(row => row.Digest).IsUnique();
            table.HasIndex(row => new { row.Site, row.Account });
        });
        model.Entity<TokenRow>(table =>
        {
            table.ToTable("tokens").HasKey(row => row.Id);
            table.HasIndex(row => row.Digest).IsUnique();
            table.HasIndex(row => new { row.Site, row.Account });
        });
    }

    private static void Assessments(ModelBuilder model)
    {
        model.Entity<AssessmentRow>(table =>
        {
            table.ToTable("assessments").HasKey(row => row.Id);
            table.HasIndex(row => row.Sequence).IsUnique();
            table.HasIndex(row => new { row.Site, row.Source, row.Criterion, row.WindowEnd, row.WindowStart, row.Scope, row.Revision }).IsUnique();
            table.HasIndex(row => new { row.WindowEnd, row.Sequence });
        });
        model.Entity<AssessmentHeadRow>(table =>
            table.ToTable("assessment_heads").HasKey(row => new { row.Site, row.Source, row.Criterion, row.Scope }));
        model.Entity<WatermarkRow>(table => table.ToTable("watermarks").HasKey(row => new { row.Site, row.Source, row.Criterion }));
    }

    private static void Alerts(ModelBuilder model)
    {
        model.Entity<AlertRow>(table =>
        {
            table.ToTable("alerts").HasKey(row => row.Id);
            table.HasIndex(row => row.Number).IsUnique();
            table.HasIndex(row => new { row.RaisedAt, row.Number });
            table.HasIndex(row => row.State);
        });
        model.Entity<AlertTransitionRow>(table => table.ToTable("alert_transitions").HasKey(row => new { row.AlertId, row.Sequence }));
        model.Entity<OutboxRow>(table =>
        {
            table.ToTable("outbox").HasKey(row => row.Id);
            table.HasIndex(row => row.AlertId);
            table.HasIndex(row => row.DueAt).HasFilter("sent_at IS NULL AND given_up_at IS NULL");
        });
    }

    private static void NameColumns(ModelBuilder model)
    {
        foreach (IMutableEntityType entity in model.Model.GetEntityTypes())
        {
            foreach (IMutableProperty property in entity.GetProperties())
            {
                property.SetColumnName(ColumnName(property.Name));
                property.ValueGenerated = ValueGenerated.Never;
            }
        }
    }

    private static string ColumnName(string property) =>
        string.Concat(property.Select((letter, index) =>
            char.IsUpper(letter) ? (index > 0 ? "_" : string.Empty) + char.ToLowerInvariant(letter) : letter.ToString()));
}
