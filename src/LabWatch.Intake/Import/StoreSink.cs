using System.Text;
using LabWatch.Intake.Pipeline;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Intake.Import;

/// <summary>Puts readings into the store of a service that is stopped, and what was refused into its quarantine.</summary>
internal sealed class StoreSink(IReadingStore store, IQuarantine quarantine, string root, string file, TimeProvider clock) : IImportSink
{
    /// <inheritdoc/>
    public async Task<(int Stored, int Duplicates, int Conflicts)?> PutAsync(IReadOnlyList<ImportPack> packs, IReadOnlyList<RefusedRow> refused, CancellationToken cancellationToken)
    {
        AppendResult? result = packs.Count == 0 ? null : await store.AppendAsync([.. packs.Select(pack => pack.Pack)], cancellationToken);
        QuarantinedMessage[] kept =
        [
            .. refused.Select(row => new QuarantinedMessage(Instant.Now(clock), FormattableString.Invariant($"import/{file}/line-{row.Line}"), Encoding.UTF8.GetBytes(row.Text[..Math.Min(row.Text.Length, MessageIntake.QuarantinedBytes)]), row.Findings)),
            .. result?.Conflicts.Select(conflict => ConflictReport.Of(conflict, root)) ?? [],
        ];
        if (kept.Length > 0)
        {
            await quarantine.AddAsync(kept, cancellationToken);
        }

        return (result?.Accepted ?? 0, result?.Duplicates ?? 0, result?.Conflicts.Count ?? 0);
    }
}
