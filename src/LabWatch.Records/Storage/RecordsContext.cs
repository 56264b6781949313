using LabWatch.Records.Audit;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Storage;

/// <summary>The tables of the records, the same for each engine. One derived context an engine carries its migrations.</summary>
internal abstract class RecordsContext(DbContextOptions options) : DbContext(options)
{
    public DbSet<AssessmentRow> Assessments => Set<AssessmentRow>();

    public DbSet<AssessmentHeadRow> AssessmentHeads => Set<AssessmentHeadRow>();

    public DbSet<WatermarkRow> Watermarks => Set<WatermarkRow>();

    public DbSet<AlertRow> Alerts => Set<AlertRow>();

    public DbSet<AlertTransitionRow> AlertTransitions => Set<AlertTransitionRow>();

    public DbSet<OutboxRow> Outbox => Set<OutboxRow>();

    public DbSet<PositionRow> Positions => Set<PositionRow>();

    public DbSet<LabImportRow> LabImports => Set<LabImportRow>();

    public DbSet<RevisionRow> Revisions => Set<RevisionRow>();

    public DbSet<RunRow> Runs => Set<RunRow>();

    public DbSet<RunStepRow> RunSteps => Set<RunStepRow>();

    public DbSet<AccountRow> Accounts => Set<AccountRow>();

    public DbSet<AccountUseRow> AccountUse => Set<AccountUseRow>();

    public DbSet<SessionRow> Sessions => Set<SessionRow>();

    public DbSet<TokenRow> Tokens => Set<TokenRow>();

    public DbSet<AuditEntryRow> AuditEntries => Set<AuditEntryRow>();

    /// <summary>Ends of the audit chains that this context has read or made, by site.</summary>
    public Dictionary<string, AuditHead> ChainHeads { get; } = new(StringComparer.Ordinal);

    protected override void OnModelCreating(ModelBuilder modelBuilder) => RecordsModel.Build(modelBuilder);
}
