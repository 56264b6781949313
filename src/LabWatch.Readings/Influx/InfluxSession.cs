using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;

namespace LabWatch.Readings.Influx;

/// <summary>What is known of the database while the store works: opened on first use, used by one caller at a time.</summary>
internal sealed class InfluxSession(InfluxDbReadingsOptions options, string dataDirectory, InfluxConnection connection, InfluxQueries queries, InfluxSealer sealer, TimeProvider clock) : IDisposable
{
    private readonly List<Finding> _findings = [];

    /// <summary>Whether the database was opened once.</summary>
    public bool IsReady { get; private set; }

    /// <summary>Number of the last commit.</summary>
    public long Change { get; set; }

    /// <summary>Number of the last commit when the store was opened: what changed since is in memory.</summary>
    public long OpenedAt { get; private set; }

    /// <summary>The claim of this program.</summary>
    public InfluxWriterClaim? Claim { get; private set; }

    /// <summary>Hours with something that is not sealed, and the monotonic time of their last reading.</summary>
    public Dictionary<(SourceKey Source, long Hour), long> Open { get; } = [];

    public IReadOnlyList<Finding> Findings => _findings;

    public async Task OpenAsync(CancellationToken cancellationToken)
    {
        if (IsReady)
        {
            return;
        }

        if (options.CreateDatabase && !options.WritePath.StartsWith("/api/v2", StringComparison.Ordinal))
        {
            await connection.QueryAsync($"CREATE DATABASE \"{options.Database.Split('/')[0]}\"", static (_, _, _) => { }, cancellationToken);
        }

        Claim ??= await InfluxWriterClaim.TakeAsync(connection, queries, MarkPath(), cancellationToken);
        (Change, sealer.Last, List<(SourceKey Source, long Hour)> open) = await queries.StateAsync(cancellationToken);
        open.ForEach(one => Open[one] = clock.GetTimestamp());
        NoticeMissing(Claim.LastChange);
        await CheckRetentionAsync(cancellationToken);
        OpenedAt = Change;
        IsReady = true;
    }

    public void Dispose() => Claim?.Dispose();

    private string MarkPath()
    {
        ulong number = BinaryPrimitives.ReadUInt64LittleEndian(SHA256.HashData(Encoding.UTF8.GetBytes(connection.Location)));
        return Path.Combine(dataDirectory, FormattableString.Invariant($"readings-influxdb-{number:x16}.mark"));
    }

    private void NoticeMissing(long marked)
    {
        if (marked > Change)
        {
            _findings.Add(new Finding(
                "set-aside-missing", connection.Location, FormattableString.Invariant($"Commits {Change + 1} to {marked} were made durable and are gone from the database."), null,
                "Restore the database from a backup, or have the devices send again what they buffered."));
            Change = marked;
        }
    }

    private async Task CheckRetentionAsync(CancellationToken cancellationToken)
    {
        List<string> ending = [];
        try
        {
            string[] parts = options.Database.Split('/');
            await connection.QueryAsync(
                $"SHOW RETENTION POLICIES ON \"{parts[0]}\"",
                (_, _, rows) => ending.AddRange(rows.EnumerateArray()
                    .Where(row => (parts.Length > 1 ? row[0].GetString() == parts[1] : row[4].GetBoolean()) && row[1].GetString() != "0s")
                    .Select(row => $"{row[0].GetString()} ({row[1].GetString()})")),
                cancellationToken);
        }
        catch (StoreUnavailableException)
        {
            // Not every generation answers this; the reference page says what the set-up must be.
        }

        _findings.AddRange(ending.Select(policy => new Finding(
            "readings-expire", connection.Location, $"The retention policy {policy} deletes readings behind this program.", null, "Set its duration to INF.")));
    }
}
