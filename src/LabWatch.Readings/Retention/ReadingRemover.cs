using System.Data.Common;
using System.Security.Cryptography;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Engine;
using LabWatch.Readings.Engine.Sqlite;

namespace LabWatch.Readings.Retention;

/// <summary>
/// Removes raw readings from sealed parts of a store that no service has open. Summaries, the rows of hours, the digest of the sealed part
/// and its count of readings stay. Whoever calls enters the digests in the trail first.
/// </summary>
public sealed class ReadingRemover : IDisposable
{
    private const int BlocksAtOnce = 64;

    private readonly FileStream _lock;
    private readonly SqliteDialect _dialect;
    private readonly StoreConnection _connection;
    private readonly Dictionary<long, SourceKey> _sources = [];
    private readonly BlockEncoder _encoder = new();

    private ReadingRemover(FileStream held, SqliteDialect dialect, StoreConnection connection)
    {
        _lock = held;
        _dialect = dialect;
        _connection = connection;
        using DbDataReader reader = connection.Query(StoreDialect.Sources);
        while (reader.Read())
        {
            _sources[reader.GetInt64(0)] = new SourceKey(reader.GetString(1), reader.GetString(2));
        }
    }

    /// <summary>Opens the readings of a data directory. Throws <see cref="StoreUnavailableException"/> where a service has them open or they cannot be written.</summary>
    public static ReadingRemover Open(string dataDirectory)
    {
        string path = Path.Combine(dataDirectory, SqliteReadingStore.FileName);
        try
        {
            FileStream held = new(Path.ChangeExtension(path, ".lock"), FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None);
            SqliteDialect dialect = new(path);
            return new ReadingRemover(held, dialect, new StoreConnection(dialect.OpenWriter()));
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException or DbException)
        {
            throw new StoreUnavailableException($"The readings in {path} are in use or cannot be written: {error.Message}", error);
        }
    }

    /// <summary>The parts with readings older than they must be kept, in the order in which they were sealed.</summary>
    /// <param name="keepFrom">From when on readings of a channel must be kept; null for ever.</param>
    /// <param name="before">No reading from then on is asked about.</param>
    /// <param name="cancellationToken">Ends the search.</param>
    public IEnumerable<RemovablePart> Find(Func<ChannelKey, Instant?> keepFrom, Instant before, CancellationToken cancellationToken)
    {
        long after = 0;
        while (true)
        {
            cancellationToken.ThrowIfCancellationRequested();
            List<(long Id, long Source, long Hour, int Part, byte[] Digest, byte[] Data)> blocks = Next(before, after);
            foreach (var (id, source, hour, part, digest, data) in blocks)
            {
                after = id;
                if (data.Length > 0 && Judge(id, _sources[source], hour, part, digest, data, keepFrom) is { } found)
                {
                    yield return found;
                }
            }

            if (blocks.Count < BlocksAtOnce)
            {
                yield break;
            }
        }
    }

    /// <summary>Removes what was found, all or nothing.</summary>
    public void Remove(IReadOnlyList<RemovablePart> parts, Instant at)
    {
        using DbTransaction transaction = _connection.Begin();
        foreach (RemovablePart part in parts)
        {
            _connection.Execute(transaction, StoreDialect.SetBlockData, part.Left.ToArray(), part.Seal);
            _connection.Execute(transaction, StoreDialect.SetThinned, part.Seal, at.Microseconds, part.DigestAfter.ToArray());
        }

        transaction.Commit();
    }

    /// <summary>Gives the space back to the disk.</summary>
    public void ReleaseSpace()
    {
        while (_dialect.ReleaseSpace(_connection))
        {
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _connection.Dispose();
        _lock.Dispose();
    }

    private List<(long, long, long, int, byte[], byte[])> Next(Instant before, long after)
    {
        List<(long, long, long, int, byte[], byte[])> blocks = [];
        using DbDataReader reader = _connection.Query(StoreDialect.OldBlocks, before.Microseconds, after, BlocksAtOnce);
        while (reader.Read())
        {
            blocks.Add((reader.GetInt64(0), reader.GetInt64(1), reader.GetInt64(2), reader.GetInt32(3), reader.GetFieldValue<byte[]>(4), reader.GetFieldValue<byte[]>(5)));
        }

        return blocks;
    }

    private RemovablePart? Judge(long id, SourceKey source, long hour, int part, byte[] digest, byte[] data, Func<ChannelKey, Instant?> keepFrom)
    {
        SealedBlock block;
        try
        {
            block = SealedBlock.Open(data);
        }
        catch (DamagedDataException)
        {
            // Damage is evidence too: it stays until somebody has looked at it.
            return null;
        }

        long end = hour + Instant.MicrosecondsPerHour;
        List<ReadingSeries> left = [];
        List<string> channels = [];
        for (int i = 0; i < block.Channels.Count; i++)
        {
            string name = block.Channels[i].Name;
            if (keepFrom(new ChannelKey(source, name)) is { } from && end <= from.Microseconds)
            {
                channels.Add(name);
            }
            else
            {
                left.Add(block.Decode(i));
            }
        }

        if (channels.Count == 0)
        {
            return null;
        }

        byte[] bytes = left.Count == 0 ? [] : _encoder.Encode(block.Header, left);
        long readings = block.Readings - left.Sum(one => (long)one.Count);
        return new RemovablePart(id, source, new Instant(hour), part, channels, readings, digest, SHA256.HashData(bytes), bytes);
    }
}
