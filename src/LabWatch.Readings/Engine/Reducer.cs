using System.Data.Common;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;
using LabWatch.Readings.Summaries;

namespace LabWatch.Readings.Engine;

/// <summary>
/// Reduces a channel: to whole hours from the rows of hours of each day, to minutes from the summaries of sealed hours where these are fine
/// enough, everything else from the raw readings.
/// </summary>
internal sealed class Reducer(HeadState head, ReaderPool readers, StoreIncidents incidents, WindowReader windows)
{
    private readonly HourlyReader _hourly = new(readers);

    public IReadOnlyList<ReadingSummary> Reduce(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken)
    {
        long step = bucket.Ticks / TimeSpan.TicksPerMicrosecond;
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(step, nameof(bucket));
        if (window.End <= window.Start)
        {
            return [];
        }

        List<ReadingSummary> rows = [];
        if (step % Instant.MicrosecondsPerHour != 0 || !TryHours(rows, channel, window, step, cancellationToken))
        {
            AddSummaries(rows, channel, window, step, cancellationToken);
        }

        return SummaryFold.Coarsen(rows, step);
    }

    /// <summary>Takes whole hours from the rows of hours, and the edges and the hours these do not tell of in the other ways.</summary>
    private bool TryHours(List<ReadingSummary> rows, ChannelKey channel, TimeWindow window, long step, CancellationToken cancellationToken)
    {
        (long from, long to) = WholeHours(window);
        HashSet<long> open = [.. HeadCapture.Take(head, channel.Source, [], from, to, out HeadSource? source).Select(slice => slice.Hour)];
        if (source is null || from >= to || _hourly.Read(source, channel.Channel, from, to, open) is not { } hours)
        {
            return false;
        }

        rows.AddRange(hours.Where(hour => !open.Contains(hour.Key)).Select(hour => hour.Value));
        AddSummaries(rows, channel, new TimeWindow(window.Start, new Instant(from)), step, cancellationToken);
        foreach (TimeWindow run in Runs(open.Where(hour => hour >= from && hour < to)))
        {
            AddSummaries(rows, channel, run, step, cancellationToken);
        }

        AddSummaries(rows, channel, new TimeWindow(new Instant(to), window.End), step, cancellationToken);
        rows.Sort((left, right) => left.Start.CompareTo(right.Start));
        return true;
    }

    private void AddSummaries(List<ReadingSummary> rows, ChannelKey channel, TimeWindow window, long step, CancellationToken cancellationToken)
    {
        SortedDictionary<long, ChannelSummary?> ready = step % SummaryCodec.Minute == 0 ? Ready(channel, window, step) : [];
        Instant raw = window.Start;
        foreach ((long hour, ChannelSummary? summary) in ready)
        {
            AddRaw(rows, channel, new TimeWindow(raw, new Instant(hour)), step, cancellationToken);
            rows.AddRange(summary?.Rows ?? []);
            raw = new Instant(hour + Instant.MicrosecondsPerHour);
        }

        AddRaw(rows, channel, new TimeWindow(raw, window.End), step, cancellationToken);
    }

    /// <summary>Hours as stretches without a gap.</summary>
    private static IEnumerable<TimeWindow> Runs(IEnumerable<long> hours)
    {
        (long start, long end) = (0, long.MinValue);
        foreach (long hour in hours.Order())
        {
            if (hour != end && end > start)
            {
                yield return new TimeWindow(new Instant(start), new Instant(end));
            }

            (start, end) = (hour == end ? start : hour, hour + Instant.MicrosecondsPerHour);
        }

        if (end > start)
        {
            yield return new TimeWindow(new Instant(start), new Instant(end));
        }
    }

    /// <summary>The hours that lie wholly in a window: first, and first after.</summary>
    private static (long From, long To) WholeHours(TimeWindow window) =>
        (new Instant(window.Start.Microseconds + Instant.MicrosecondsPerHour - 1).StartOfHour().Microseconds, window.End.StartOfHour().Microseconds);

    private void AddRaw(List<ReadingSummary> rows, ChannelKey channel, TimeWindow window, long step, CancellationToken cancellationToken)
    {
        if (window.End <= window.Start)
        {
            return;
        }

        long fine = step % SummaryCodec.Minute == 0 ? SummaryCodec.Minute : step;
        if (windows.Read(channel.Source, [channel.Channel], window, cancellationToken).Find(channel.Channel) is { } series)
        {
            rows.AddRange(SummaryFold.Fold(series.TimeMicroseconds.Span, series.Values.Span, fine));
        }
    }

    /// <summary>Summaries of the hours that lie wholly in the window, have one sealed part and nothing in memory.</summary>
    private SortedDictionary<long, ChannelSummary?> Ready(ChannelKey channel, TimeWindow window, long step)
    {
        SortedDictionary<long, ChannelSummary?> ready = [];
        (long from, long to) = WholeHours(window);
        HashSet<long> unready = [.. HeadCapture.Take(head, channel.Source, [], from, to, out HeadSource? source).Select(slice => slice.Hour)];
        if (source is null || from >= to)
        {
            return ready;
        }

        readers.Use(connection =>
        {
            using DbDataReader reader = connection.Query(StoreDialect.SummariesInWindow, source.Id, from, to);
            while (reader.Read())
            {
                long hour = reader.GetInt64(1);
                byte[] bytes = reader.IsDBNull(3) ? [] : reader.GetFieldValue<byte[]>(3);
                if (reader.GetInt32(2) > 0 || unready.Contains(hour) || step % Math.Max(1, SummaryCodec.StepOf(bytes)) != 0 || incidents.IsBlockSetAside(reader.GetInt64(0))
                    || !TryDecode(reader.GetInt64(0), bytes, hour, channel.Channel, out SealedSummary? summary))
                {
                    ready.Remove(hour);
                    unready.Add(hour);
                    continue;
                }

                ready[hour] = summary!.Channels.Count > 0 ? summary.Channels[0] : null;
            }

            return 0;
        });
        return ready;
    }

    private bool TryDecode(long id, byte[] bytes, long hour, string channel, out SealedSummary? summary)
    {
        summary = null;
        try
        {
            summary = SummaryCodec.Decode(bytes, hour, channel);
        }
        catch (DamagedDataException damage)
        {
            incidents.Report(StoreIncidents.SummaryKind, id, damage.Message);
        }

        return summary is not null;
    }
}
