using System.Security.Cryptography;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Influx;

/// <summary>
/// Seals hours: the digest of a part is over the digest of the part before and the canonical form of all readings that the hour has at
/// that moment. The points stay where they are; the sealing is a point of its own in the same shard as the state of the hour, so both
/// are written or none.
/// </summary>
internal sealed class InfluxSealer(InfluxConnection connection, InfluxQueries queries, InfluxHead head, TimeProvider clock)
{
    /// <summary>Number of the last sealing.</summary>
    public long Last { get; set; }

    /// <summary>Seals an hour; gives how many readings are new in it. Call between commits.</summary>
    public async Task<int> SealAsync(SourceKey key, long start, CancellationToken cancellationToken)
    {
        InfluxSource source = head.Source(key);
        InfluxHour hour = await head.LoadAsync(source, start, cancellationToken);
        List<SealedHour> before = await queries.SealsAsync(key, start, cancellationToken);
        int added = (int)(hour.Readings - before.Sum(one => (long)one.Readings));
        if (added <= 0)
        {
            return 0;
        }

        byte[] digest = Digest(key, hour.Series(null), before.Count > 0 ? before[^1].Digest.Span : []);
        SealedHour seal = new(Last + 1, key, new Instant(start), before.Count, added, digest, Instant.Now(clock), hour.Change);
        await connection.WriteAsync([InfluxLines.Seal(seal), InfluxLines.Hour(key, start, hour.Readings, hour.Change, hour.Readings)], cancellationToken);
        Last = seal.Seal;
        hour.SealedReadings = hour.Readings;
        ReadingsMetrics.OnSealed(1, added);
        return added;
    }

    /// <summary>SHA-256 over the digest of the part before (nothing for part 0) and the canonical form of the readings.</summary>
    public static byte[] Digest(SourceKey source, IReadOnlyList<ReadingSeries> series, ReadOnlySpan<byte> previous)
    {
        using IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        hash.AppendData(previous);
        CanonicalReadings.AppendTo(hash, source, series);
        return hash.GetHashAndReset();
    }
}
