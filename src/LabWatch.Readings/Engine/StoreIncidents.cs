using System.Collections.Concurrent;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings.Engine;

/// <summary>
/// What was found damaged or missing: kept, reported, never deleted. Any thread may report; the writer makes it durable with its next
/// write that has time for it.
/// </summary>
internal sealed class StoreIncidents(string location, TimeProvider clock, ILogger log)
{
    private readonly ConcurrentDictionary<(string Kind, long Reference), string> _known = new();
    private readonly ConcurrentQueue<(string Kind, long Reference, string Reason)> _pending = new();

    public const string BlockKind = "block";
    public const string JournalKind = "journal";
    public const string MissingKind = "missing";
    public const string SummaryKind = "summary";
    public const string FileKind = "file";
    public const string DigestKind = "digest";

    public IReadOnlyList<Finding> Findings => _known.OrderBy(one => one.Key.Kind, StringComparer.Ordinal).ThenBy(one => one.Key.Reference)
        .Select(one => new Finding(
            $"set-aside-{one.Key.Kind}",
            $"{location}#{one.Key.Kind}/{one.Key.Reference}",
            one.Value,
            null,
            "The bytes are kept. Restore a backup beside this store, or have the devices send again what they buffered."))
        .ToArray();

    /// <summary>Whether something is set aside already.</summary>
    public bool Has(string kind, long reference) => _known.ContainsKey((kind, reference));

    /// <summary>Whether a block is to be passed over.</summary>
    public bool IsBlockSetAside(long id) => !_known.IsEmpty && Has(BlockKind, id);

    /// <summary>Takes over what an earlier run found.</summary>
    public void Recall(string kind, long reference, string reason) => _known.TryAdd((kind, reference), reason);

    /// <summary>Reports damage; once for each thing.</summary>
    public void Report(string kind, long reference, string reason)
    {
        if (_known.TryAdd((kind, reference), reason))
        {
            ReadingsLog.SetAside(log, kind, reference, reason);
            _pending.Enqueue((kind, reference, reason));
        }
    }

    /// <summary>Reports a block that does not have its form.</summary>
    public void ReportBlock(long id, Exception damage) => Report(BlockKind, id, damage.Message);

    /// <summary>Writes what is pending to the table. Throws what the database throws; nothing is lost then.</summary>
    public void Persist(StoreConnection writer)
    {
        while (_pending.TryPeek(out (string Kind, long Reference, string Reason) one))
        {
            byte[]? data = one.Kind == JournalKind ? TryReadJournal(writer, one.Reference) : null;
            using System.Data.Common.DbTransaction transaction = writer.Begin();
            long id = writer.Number(transaction, StoreDialect.LastSetAside) + 1;
            writer.Execute(transaction, StoreDialect.SetAside, id, one.Kind, one.Reference, one.Reason, Instant.Now(clock).Microseconds, data);
            if (data is not null)
            {
                writer.Execute(transaction, StoreDialect.DropJournalRow, one.Reference);
            }

            transaction.Commit();
            _pending.TryDequeue(out _);
        }
    }

    private static byte[]? TryReadJournal(StoreConnection writer, long change)
    {
        try
        {
            using System.Data.Common.DbDataReader reader = writer.Query(StoreDialect.JournalRow, change);
            return reader.Read() ? reader.GetFieldValue<byte[]>(0) : null;
        }
        catch (System.Data.Common.DbException)
        {
            // The page itself cannot be read: the row stays where it is and is passed over.
            return null;
        }
    }
}
