using LabWatch.Readings.Head;

namespace LabWatch.Readings.Influx;

/// <summary>An hour of a source as the database has it, in memory so that identities are looked up without asking.</summary>
internal sealed class InfluxHour(long hour)
{
    /// <summary>Start of the hour, microseconds since 1970 UTC.</summary>
    public long Hour { get; } = hour;

    /// <summary>Columns by channel.</summary>
    public Dictionary<string, HeadColumn> Columns { get; } = new(StringComparer.Ordinal);

    /// <summary>Readings published.</summary>
    public int Readings { get; set; }

    /// <summary>Readings that the last sealing covers.</summary>
    public long SealedReadings { get; set; }

    /// <summary>Last change.</summary>
    public long Change { get; set; }

    /// <summary>Whether the point of the hour says something else than its readings do: an earlier commit ended in between.</summary>
    public bool NeedsPoint { get; set; }

    /// <summary>Monotonic time stamp of the last use.</summary>
    public long Used { get; set; }

    /// <summary>What is published, in rising order of time, ordinal order of channels.</summary>
    public List<ReadingSeries> Series(IReadOnlySet<string>? wanted) =>
        [.. Columns.Where(one => one.Value.Published > 0 && wanted?.Contains(one.Key) != false)
            .OrderBy(one => one.Key, StringComparer.Ordinal)
            .Select(one => one.Value.Snapshot().ToSeries(one.Key))];
}
