using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Tests.Assessments;

/// <summary>Readings in memory, with the revisions and change numbers of the contract, and failures on demand.</summary>
internal sealed class FakeReadingStore : IReadingStore
{
    private readonly Dictionary<ChannelKey, SortedDictionary<long, Reading>> _channels = [];
    private readonly Dictionary<(SourceKey Source, Instant Hour), (long Revision, long Change)> _hours = [];
    private readonly Lock _lock = new();
    private long _change;

    /// <summary>Called before each answer; throws to fail it.</summary>
    public Action<string> Before { get; set; } = _ => { };

    /// <summary>How often raw readings were read.</summary>
    public int Reads { get; private set; }

    public void Add(SourceKey source, IEnumerable<Reading> readings)
    {
        lock (_lock)
        {
            _change++;
            foreach (Reading reading in readings)
            {
                ChannelKey key = new(source, reading.Channel);
                if (!_channels.TryGetValue(key, out SortedDictionary<long, Reading>? channel))
                {
                    _channels[key] = channel = [];
                }

                if (channel.TryAdd(reading.Time.Microseconds, reading))
                {
                    (SourceKey, Instant) hour = (source, reading.Time.StartOfHour());
                    _hours[hour] = (_hours.GetValueOrDefault(hour).Revision + 1, _change);
                }
            }
        }
    }

    public ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken)
    {
        foreach (ReadingPack pack in packs)
        {
            Add(pack.Source, pack.Readings);
        }

        return new(new AppendResult(packs.Sum(pack => pack.Readings.Count), 0, []));
    }

    public ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken)
    {
        Before(nameof(ReadAsync));
        return new(Read(source, channels, window));
    }

    public ReadingWindow Read(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window)
    {
        lock (_lock)
        {
            Reads++;
            List<ReadingSeries> series = [];
            foreach ((ChannelKey key, SortedDictionary<long, Reading> readings) in _channels.OrderBy(pair => pair.Key.Channel, StringComparer.Ordinal))
            {
                Reading[] inside = [.. readings.Values.Where(reading => window.Contains(reading.Time))];
                if (key.Source == source && (channels?.Contains(key.Channel) ?? true) && inside.Length > 0)
                {
                    series.Add(new(
                        key.Channel,
                        inside.Select(reading => reading.Time.Microseconds).ToArray(),
                        inside.Select(reading => reading.Value).ToArray(),
                        inside.Select(reading => reading.Quality).ToArray()));
                }
            }

            return new ReadingWindow(source, window, series, Hours(source, window));
        }
    }

    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken) =>
        throw new NotSupportedException("The planner reads raw readings only.");

    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken) =>
        throw new NotSupportedException("The planner reads raw readings only.");

    public ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken)
    {
        Before(nameof(HoursAsync));
        lock (_lock)
        {
            return new(Hours(source, window));
        }
    }

    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken)
    {
        Before(nameof(ChangesAsync));
        lock (_lock)
        {
            return new(new ChangedHours(_change, [.. _hours.Where(pair => pair.Value.Change > afterChange).Select(pair => pair.Key)]));
        }
    }

    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) =>
        throw new NotSupportedException("The planner reads raw readings only.");

    public ValueTask DisposeAsync() => ValueTask.CompletedTask;

    private List<SourceHourRead> Hours(SourceKey source, TimeWindow window) =>
        [.. _hours
            .Where(pair => pair.Key.Source == source && pair.Key.Hour < window.End && pair.Key.Hour + TimeSpan.FromHours(1) > window.Start)
            .OrderBy(pair => pair.Key.Hour)
            .Select(pair => new SourceHourRead(pair.Key.Hour, pair.Value.Revision))];
}
