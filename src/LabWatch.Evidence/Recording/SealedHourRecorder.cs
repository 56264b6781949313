using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Audit;
using Microsoft.Extensions.Logging;

namespace LabWatch.Evidence.Recording;

/// <summary>
/// Enters the digest of every sealed part in the trail, in the order of sealing. How far it has come moves in the transaction of the
/// entries, so that a restart at any point neither leaves one out nor enters one twice. Not thread-safe.
/// </summary>
internal sealed class SealedHourRecorder(IReadingStore store, IAuditLedger trail, IPositionLedger positions, ILogger<SealedHourRecorder> logger, ReadingsOptions? readings = null)
{
    /// <summary>Name of the position in the file of readings; with another engine its name follows, because its seals are counted apart.</summary>
    public const string Reader = "trail/sealed-hours";

    private const int Batch = 200;

    private readonly string _reader = readings is null or { Engine: ReadingsEngine.Sqlite } ? Reader : $"{Reader}/{readings.Engine.ToString().ToLowerInvariant()}";
    private long? _position;

    /// <summary>Enters what was sealed since the last time; gives the number of entries.</summary>
    public async Task<int> RecordAsync(CancellationToken cancellationToken)
    {
        long position = _position ??= await ResumeAsync(cancellationToken);
        int entered = 0;
        while (await store.SealedHoursAsync(position, Batch, cancellationToken) is { Count: > 0 } parts)
        {
            position = parts[^1].Seal;

            // Until the answer is there it is not known whether the entries were made: after a failure the stored position tells.
            _position = null;
            await trail.AppendAsync([.. parts.Select(HourNote.Of)], (_reader, position), cancellationToken);
            _position = position;
            entered += parts.Count;
        }

        return entered;
    }

    /// <summary>
    /// The stored position, where the store still holds that seal. A store that was begun anew (its file was put aside or lost) counts its
    /// seals from 1 again; all of it is entered.
    /// </summary>
    private async Task<long> ResumeAsync(CancellationToken cancellationToken)
    {
        long position = await positions.PositionAsync(_reader, cancellationToken);
        if (position == 0 && !string.Equals(_reader, Reader, StringComparison.Ordinal))
        {
            // Sealed hours that were transferred as they are keep their numbers: what the file had entered need not be entered again.
            position = await positions.PositionAsync(Reader, cancellationToken);
        }

        if (position == 0)
        {
            return 0;
        }

        IReadOnlyList<SealedHour> at = await store.SealedHoursAsync(position - 1, 1, cancellationToken);
        if (at.Count > 0 && at[0].Seal == position && await IsEnteredAsync(HourNote.Of(at[0]), cancellationToken))
        {
            return position;
        }

        EvidenceLog.StoreBegunAnew(logger, position);
        return 0;
    }

    private async Task<bool> IsEnteredAsync(AuditNote note, CancellationToken cancellationToken)
    {
        AuditPage page = await trail.ListAsync(new AuditQuery(note.Site, 1) { Subject = note.Subject }, cancellationToken);
        return page.Items.Count > 0 && page.Items[0].RecordDigest == note.RecordDigest;
    }
}
