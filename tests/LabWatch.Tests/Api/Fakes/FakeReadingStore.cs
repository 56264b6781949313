using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>A reading store in memory.</summary>
internal sealed class FakeReadingStore : IReadingStore, IReadingStoreHealth
{
    private readonly Lock _gate = new();
    private readonly Dictionary<ChannelKey, SortedList<long, Reading>> _channels = [];

    /// <inheritdoc/>
    public IReadOnlyList<LabWatch.Lab.Findings.Finding> Findings => [];

    /// <inheritdoc/>
    public string? Trouble { get; set; }

    /// <summary>Whether every call throws, as a store does that cannot answer.</summary>
    public bool IsDown { get; set; }

    public void Add(SourceKey source, params Reading[] readings)
    {
        lock (_gate)
        {
            foreach (Reading reading in readings)
            {
                ChannelKey key = new(source, reading.Channel);
                if (!_channels.TryGetValue(key, out SortedList<long, Reading>? list))
                {
                    _channels[key] = list = [];
                }

                list.TryAdd(reading.Time.Microseconds, reading);
            }
        }
    }

    public ValueTask<AppendResult> AppendAsync(IReadOnlyList<ReadingPack> packs, CancellationToken cancellationToken)
    {
        Answer();
        foreach (ReadingPack pack in packs)
        {
            Add(pack.Source, [.. pack.Readings]);
        }

        return new(new AppendResult(packs.Sum(pack => pack.Readings.Count), 0, []));
    }

    public ValueTask<ReadingWindow> ReadAsync(SourceKey source, IReadOnlyCollection<string>? channels, TimeWindow window, CancellationToken cancellationToken)
    {
        Answer();
        lock (_gate)
        {
            List<ReadingSeries> series = [];
            foreach ((ChannelKey key, _) in _channels.Where(entry => entry.Key.Source == source && channels?.Contains(entry.Key.Channel) != false))
            {
                Reading[] rows = Rows(key, window);
                series.Add(new ReadingSeries(
                    key.Channel, rows.Select(row => row.Time.Microseconds).ToArray(), rows.Select(row => row.Value).ToArray(), rows.Select(row => row.Quality).ToArray()));
            }

            return new(new ReadingWindow(source, window, series, []));
        }
    }

    public ValueTask<IReadOnlyList<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, TimeSpan bucket, CancellationToken cancellationToken)
    {
        Answer();
        lock (_gate)
        {
            return new(
            [
                .. Rows(channel, window)
                    .Where(row => double.IsFinite(row.Value))
                    .GroupBy(row => row.Time.Floor(bucket.Ticks / TimeSpan.TicksPerMicrosecond))
                    .Select(rows => new ReadingSummary(
                        rows.Key, rows.Count(), rows.First().Value, rows.Last().Value, rows.Min(row => row.Value), rows.Max(row => row.Value), rows.Average(row => row.Value), 0)),
            ]);
        }
    }

    public ValueTask<IReadOnlyList<Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken)
    {
        Answer();
        lock (_gate)
        {
            return new([.. _channels.Where(entry => entry.Key.Source == source && entry.Value.Count > 0).Select(entry => entry.Value.Values[^1])]);
        }
    }

    public ValueTask<IReadOnlyList<SourceHourRead>> HoursAsync(SourceKey source, TimeWindow window, CancellationToken cancellationToken) => new([]);

    public ValueTask<ChangedHours> ChangesAsync(long afterChange, CancellationToken cancellationToken) => new(new ChangedHours(0, []));

    public ValueTask<IReadOnlyList<SealedHour>> SealedHoursAsync(long afterSeal, int count, CancellationToken cancellationToken) => new([]);

    public ValueTask DisposeAsync() => default;

    private Reading[] Rows(ChannelKey channel, TimeWindow window) =>
        _channels.TryGetValue(channel, out SortedList<long, Reading>? list) ? [.. list.Values.Where(row => window.Contains(row.Time))] : [];

    private void Answer()
    {
        if (IsDown)
        {
            throw new StoreUnavailableException("The disk with the secret path is full.");
        }
    }

    /// <inheritdoc/>
    public ValueTask OpenAsync(CancellationToken cancellationToken) => ValueTask.CompletedTask;
}
