using System.Globalization;
using System.Text;
using LabWatch.Lab.Identity;
using LabWatch.Records.Audit.Verification;
using Microsoft.Data.Sqlite;

namespace LabWatch.Evidence.Verification;

/// <summary>The database of the readings, opened for reading alone, as the bytes that lie in it.</summary>
internal sealed class SealedFile : ISealedParts
{
    private const string PartColumns = "id, source_id, hour, part, readings, last_change, sealed_at, digest";

    private readonly SqliteConnection _connection;

    private SealedFile(SqliteConnection connection) => _connection = connection;

    /// <summary>Opens the file. Throws <see cref="UnreadableException"/> where that cannot be done.</summary>
    public static SealedFile Open(string path, bool inUse) => new(SqliteReadOnly.Open(path, inUse));

    /// <summary>The sources by their number in the file.</summary>
    public Dictionary<long, SourceKey> Sources(out string? damage)
    {
        Dictionary<long, SourceKey> sources = [];
        damage = Walk("SELECT id, site, source FROM source NOT INDEXED", scan =>
        {
            if (scan.Kind(1) is CellKind.Text && scan.Kind(2) is CellKind.Text)
            {
                sources[scan.Whole(0)] = new SourceKey(Encoding.UTF8.GetString(scan.Bytes(1)), Encoding.UTF8.GetString(scan.Bytes(2)));
            }
        });
        return sources;
    }

    /// <summary>Every sealed part without its bytes, in the order of sealing; behind a damaged page from the other end.</summary>
    /// <param name="damage">Why not all could be read; null where all was.</param>
    /// <param name="odd">Rows that hold values of another kind than they were written with.</param>
    public List<StoredPart> Parts(out string? damage, out List<long> odd)
    {
        List<StoredPart> parts = [];
        HashSet<long> seen = [];
        List<long> strange = [];
        damage = Walk($"SELECT {PartColumns} FROM block NOT INDEXED", Take);
        if (damage is not null)
        {
            Walk($"SELECT {PartColumns} FROM block NOT INDEXED ORDER BY id DESC", Take);
        }

        odd = strange;
        return parts;

        void Take(TableScan scan)
        {
            if (!seen.Add(scan.Whole(0)))
            {
                return;
            }

            bool isWhole = Enumerable.Range(1, 6).All(place => scan.Kind(place) is CellKind.Whole) && scan.Kind(7) is CellKind.Bytes;
            if (isWhole)
            {
                parts.Add(new StoredPart(scan.Whole(0), scan.Whole(1), scan.Whole(2), scan.Whole(3), scan.Whole(4), scan.Whole(5), scan.Whole(6), scan.Bytes(7).ToArray()));
            }
            else
            {
                strange.Add(scan.Whole(0));
            }
        }
    }

    /// <summary>Numbers of the parts that have a summary.</summary>
    public HashSet<long> Summaries(out string? damage)
    {
        HashSet<long> summaries = [];
        damage = Walk("SELECT block_id FROM summary", scan => summaries.Add(scan.Whole(0)));
        return summaries;
    }

    /// <summary>The bytes of a part, or of its summary; null where they are no bytes. Throws <see cref="UnreadableException"/>.</summary>
    public byte[]? Data(string table, string key, long id)
    {
        using SqliteScan scan = new(_connection, string.Create(CultureInfo.InvariantCulture, $"SELECT data FROM {table} WHERE {key} = {id}"));
        return scan.Read() && scan.Kind(0) is CellKind.Bytes ? scan.Bytes(0).ToArray() : null;
    }

    /// <inheritdoc/>
    public void Dispose() => _connection.Dispose();

    private string? Walk(string sql, Action<TableScan> take)
    {
        try
        {
            using SqliteScan scan = new(_connection, sql);
            while (scan.Read())
            {
                take(scan);
            }

            return null;
        }
        catch (UnreadableException exception)
        {
            return exception.Message;
        }
    }
}
