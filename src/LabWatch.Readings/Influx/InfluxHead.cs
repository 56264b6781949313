using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings.Head;

namespace LabWatch.Readings.Influx;

/// <summary>
/// What the store has in memory: the hours that readings came for lately, whole. Structure changes and publishing happen under
/// <see cref="Sync"/>; readers capture under it. Loading an hour costs one query, keeping it about 25 bytes a reading.
/// </summary>
internal sealed class InfluxHead(InfluxQueries queries, int readingsLimit, TimeProvider clock)
{
    private readonly Dictionary<SourceKey, InfluxSource> _sources = [];
    private long _readings;

    public Lock Sync { get; } = new();

    public InfluxSource Source(SourceKey key)
    {
        lock (Sync)
        {
            if (!_sources.TryGetValue(key, out InfluxSource? source))
            {
                _sources.Add(key, source = new InfluxSource(key));
            }

            return source;
        }
    }

    /// <summary>The hours of a source that are in memory, within a range, as they are now.</summary>
    public SortedDictionary<long, (int Readings, List<ReadingSeries> Series)> Capture(SourceKey key, IReadOnlySet<string>? wanted, long from, long to)
    {
        SortedDictionary<long, (int, List<ReadingSeries>)> captured = [];
        lock (Sync)
        {
            if (_sources.TryGetValue(key, out InfluxSource? source))
            {
                foreach (InfluxHour hour in source.Hours.Values.Where(one => one.Hour >= from && one.Hour < to))
                {
                    captured.Add(hour.Hour, (hour.Readings, hour.Series(wanted)));
                }
            }
        }

        return captured;
    }

    /// <summary>An hour with all its readings; asked for where it is not in memory.</summary>
    public async Task<InfluxHour> LoadAsync(InfluxSource source, long start, CancellationToken cancellationToken)
    {
        if (source.Hours.TryGetValue(start, out InfluxHour? known))
        {
            known.Used = clock.GetTimestamp();
            return known;
        }

        InfluxHour hour = new(start) { Used = clock.GetTimestamp() };
        SortedDictionary<long, (long Readings, long Change, long Sealed)> points = await queries.ReadAsync(
            source.Key, null, start, start + Instant.MicrosecondsPerHour,
            (channel, rows) => Take(hour, channel, rows), cancellationToken);
        foreach (HeadColumn column in hour.Columns.Values)
        {
            hour.Readings += column.Publish();
        }

        (long readings, long change, long sealedReadings) = points.GetValueOrDefault(start);
        hour.Change = change;
        hour.SealedReadings = sealedReadings;
        hour.NeedsPoint = readings != hour.Readings;
        lock (Sync)
        {
            source.Hours.Add(start, hour);
            _readings += hour.Readings;
        }

        return hour;
    }

    /// <summary>Counts published readings and makes room: the hours used longest ago go. Call under <see cref="Sync"/>, between commits.</summary>
    public void OnPublished(int readings)
    {
        _readings += readings;
        if (_readings <= readingsLimit)
        {
            return;
        }

        foreach ((InfluxSource source, InfluxHour hour) in _sources.Values.SelectMany(one => one.Hours.Values.Select(hour => (one, hour))).OrderBy(one => one.hour.Used).ToArray())
        {
            if (_readings <= readingsLimit / 2)
            {
                return;
            }

            source.Hours.Remove(hour.Hour);
            _readings -= hour.Readings;
        }
    }

    /// <summary>Forgets hours whose state in the database is not known any more.</summary>
    public void Forget(IEnumerable<(InfluxSource Source, InfluxHour Hour)> hours)
    {
        lock (Sync)
        {
            foreach ((InfluxSource source, InfluxHour hour) in hours)
            {
                if (source.Hours.Remove(hour.Hour))
                {
                    _readings -= hour.Readings;
                }
            }
        }
    }

    private static void Take(InfluxHour hour, string channel, System.Text.Json.JsonElement rows)
    {
        if (!hour.Columns.TryGetValue(channel, out HeadColumn? column))
        {
            hour.Columns.Add(channel, column = new HeadColumn());
        }

        foreach (System.Text.Json.JsonElement row in rows.EnumerateArray())
        {
            column.Stage(row[0].GetInt64(), InfluxQueries.Value(row), InfluxQueries.Quality(row));
        }
    }
}
