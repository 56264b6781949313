using System.Text.Json;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Engine;
using LabWatch.Readings.Head;

namespace LabWatch.Readings.Influx;

/// <summary>Reads windows: hours in memory from there, the others from the server, in one request for each stretch of them.</summary>
internal sealed class InfluxReader(InfluxQueries queries, InfluxHead head)
{
    public async Task<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken)
    {
        if (window.End <= window.Start)
        {
            return new ReadingWindow(source, window, [], []);
        }

        HashSet<string>? wanted = channels?.ToHashSet(StringComparer.Ordinal);
        (long from, long to) = WindowReader.HoursOf(window);
        SortedDictionary<long, (int Readings, List<ReadingSeries> Series)> memory = head.Capture(source, wanted, from, to);
        SeriesBuilder builder = new(window);
        SortedDictionary<long, long> revisions = [];
        foreach ((long start, long end) in Stretches(from, to, memory.Keys))
        {
            await AskAsync(source, wanted, Math.Max(start, window.Start.Microseconds), Math.Min(end, window.End.Microseconds), builder, revisions, cancellationToken);
        }

        foreach ((long hour, (int readings, List<ReadingSeries> series)) in memory)
        {
            series.ForEach(builder.Add);
            revisions[hour] = readings;
        }

        return new ReadingWindow(source, window, builder.Build(), [.. revisions.Where(one => one.Value > 0).Select(one => new SourceHourRead(new Instant(one.Key), one.Value))]);
    }

    public async Task<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken)
    {
        if (window.End <= window.Start)
        {
            return [];
        }

        (long from, long to) = WindowReader.HoursOf(window);
        SortedDictionary<long, (int Readings, List<ReadingSeries> Series)> memory = head.Capture(source, new HashSet<string>(), from, to);
        SortedDictionary<long, long> revisions = [];
        foreach ((long start, long end) in Stretches(from, to, memory.Keys))
        {
            foreach ((long hour, (long readings, _, _)) in await queries.HoursAsync(source, start, end, cancellationToken))
            {
                revisions[hour] = readings;
            }
        }

        foreach ((long hour, (int readings, _)) in memory)
        {
            revisions[hour] = readings;
        }

        return [.. revisions.Where(one => one.Value > 0).Select(one => new SourceHourRead(new Instant(one.Key), one.Value))];
    }

    public async Task<IReadOnlyList<Reading>> NewestAsync(SourceKey key, CancellationToken cancellationToken)
    {
        InfluxSource source = head.Source(key);
        Reading[]? known;
        lock (head.Sync)
        {
            known = source.Newest?.Values.ToArray();
        }

        if (known is null)
        {
            Dictionary<string, Reading> asked = await queries.NewestAsync(key, cancellationToken);
            lock (head.Sync)
            {
                source.Newest ??= asked;

                // A commit that was published while the server was asked is in memory.
                foreach (InfluxHour hour in source.Hours.Values)
                {
                    Offer(source, hour);
                }

                known = [.. source.Newest.Values];
            }
        }

        return [.. known.OrderBy(one => one.Channel, StringComparer.Ordinal)];
    }

    private static void Offer(InfluxSource source, InfluxHour hour)
    {
        foreach ((string channel, HeadColumn column) in hour.Columns.Where(one => one.Value.Published > 0))
        {
            (long time, double value, ReadingQuality quality) = column.Latest();
            source.OfferNewest(new Reading(channel, new Instant(time), value, quality));
        }
    }

    /// <summary>The stretches of hours that are not in memory.</summary>
    private static IEnumerable<(long Start, long End)> Stretches(long from, long to, IEnumerable<long> hours)
    {
        foreach (long hour in hours)
        {
            if (hour > from)
            {
                yield return (from, hour);
            }

            from = hour + Instant.MicrosecondsPerHour;
        }

        if (to > from)
        {
            yield return (from, to);
        }
    }

    private async Task AskAsync(
        SourceKey source, HashSet<string>? wanted, long from, long to, SeriesBuilder builder, SortedDictionary<long, long> revisions, CancellationToken cancellationToken)
    {
        foreach ((long hour, (long readings, _, _)) in wanted is { Count: 0 }
            ? await queries.HoursAsync(source, new Instant(from).StartOfHour().Microseconds, to, cancellationToken)
            : await queries.ReadAsync(source, wanted, from, to, (channel, rows) => builder.Add(Series(channel, rows)), cancellationToken))
        {
            revisions[hour] = readings;
        }
    }

    private static ReadingSeries Series(string channel, JsonElement rows)
    {
        int count = rows.GetArrayLength();
        long[] times = new long[count];
        double[] values = new double[count];
        ReadingQuality[] qualities = new ReadingQuality[count];
        int at = 0;
        foreach (JsonElement row in rows.EnumerateArray())
        {
            times[at] = row[0].GetInt64();
            values[at] = InfluxQueries.Value(row);
            qualities[at++] = InfluxQueries.Quality(row);
        }

        return new ReadingSeries(channel, times, values, qualities);
    }
}
