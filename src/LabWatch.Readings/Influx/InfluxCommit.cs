using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Head;

namespace LabWatch.Readings.Influx;

/// <summary>
/// One commit while it is being made: sorts readings into new, repeated and conflicting against the hours in memory, and makes the points.
/// Nothing is visible until <see cref="Publish"/>; <see cref="Rollback"/> forgets it all, and the hours it touched with it.
/// </summary>
internal sealed class InfluxCommit(InfluxHead head)
{
    private readonly List<(InfluxSource Source, InfluxHour Hour, string Channel, HeadColumn Column)> _touched = [];
    private readonly Dictionary<InfluxHour, (InfluxSource Source, List<InfluxPoint> Points)> _hours = [];

    public int Accepted { get; private set; }

    public int Duplicates { get; private set; }

    public List<ReadingConflict> Conflicts { get; } = [];

    /// <summary>Readings that the server cannot hold.</summary>
    public List<InfluxPoint> Unholdable { get; } = [];

    /// <summary>Whether there is anything to write.</summary>
    public bool IsEmpty => _hours.Values.All(one => one.Points.Count == 0) && _hours.Keys.All(hour => !hour.NeedsPoint);

    /// <summary>The hours that the commit touches.</summary>
    public IEnumerable<(InfluxSource Source, InfluxHour Hour)> Hours => _hours.Select(one => (one.Value.Source, one.Key));

    public async Task StageAsync(IReadOnlyList<ReadingPack> packs, IReadOnlySet<(string Channel, long Time)> refused, CancellationToken cancellationToken)
    {
        foreach (ReadingPack pack in packs)
        {
            InfluxSource source = head.Source(pack.Source);
            InfluxHour? hour = null;
            foreach (Reading reading in pack.Readings)
            {
                if (!InfluxLines.CanHold(reading))
                {
                    Unholdable.Add(new InfluxPoint(pack, reading, string.Empty));
                    continue;
                }

                long start = reading.Time.StartOfHour().Microseconds;
                hour = hour?.Hour == start ? hour : await head.LoadAsync(source, start, cancellationToken);
                if (refused.Count == 0 || !refused.Contains((source.Line(reading.Channel), reading.Time.Microseconds)))
                {
                    Stage(source, hour, pack, reading);
                }
            }
        }
    }

    /// <summary>The points in order, each hour followed by the point that says its new state.</summary>
    public IEnumerable<InfluxPoint> Points(long change)
    {
        foreach ((InfluxHour hour, (InfluxSource source, List<InfluxPoint> points)) in _hours)
        {
            if (points.Count > 0 || hour.NeedsPoint)
            {
                foreach (InfluxPoint point in points)
                {
                    yield return point;
                }

                yield return new InfluxPoint(null, default, InfluxLines.Hour(source.Key, hour.Hour, hour.Readings + points.Count, change, hour.SealedReadings));
            }
        }
    }

    /// <summary>Makes the commit visible, all at once; gives the hours that changed.</summary>
    public List<(InfluxSource Source, InfluxHour Hour)> Publish(long change)
    {
        List<(InfluxSource, InfluxHour)> changed = [];
        lock (head.Sync)
        {
            foreach ((InfluxSource source, InfluxHour hour, string channel, HeadColumn column) in _touched)
            {
                hour.Readings += column.Publish();
                (long time, double value, ReadingQuality quality) = column.Latest();
                source.OfferNewest(new Reading(channel, new Instant(time), value, quality));
            }

            foreach ((InfluxHour hour, (InfluxSource source, List<InfluxPoint> points)) in _hours)
            {
                if (points.Count > 0 || hour.NeedsPoint)
                {
                    hour.Change = change;
                    hour.NeedsPoint = false;
                    changed.Add((source, hour));
                }
            }

            head.OnPublished(Accepted);
        }

        return changed;
    }

    /// <summary>Forgets what was staged; the hours are asked for again, because nobody knows what the server took.</summary>
    public void Rollback()
    {
        head.Forget(Hours);
        foreach ((InfluxSource source, _, _, _) in _touched)
        {
            source.Newest = null;
        }
    }

    private void Stage(InfluxSource source, InfluxHour hour, ReadingPack pack, Reading reading)
    {
        if (!_hours.TryGetValue(hour, out (InfluxSource Source, List<InfluxPoint> Points) entry))
        {
            _hours.Add(hour, entry = (source, []));
        }

        long time = reading.Time.Microseconds;
        hour.Columns.TryGetValue(reading.Channel, out HeadColumn? column);
        if (column is not null && column.TryFind(time, out double stored))
        {
            OnKnown(pack, reading, stored);
            return;
        }

        if (column is null)
        {
            lock (head.Sync)
            {
                hour.Columns.Add(reading.Channel, column = new HeadColumn());
            }
        }

        if (column.Stage(time, reading.Value, reading.Quality))
        {
            _touched.Add((source, hour, reading.Channel, column));
        }

        entry.Points.Add(new InfluxPoint(pack, reading, InfluxLines.Reading(source.Line(reading.Channel), time, reading.Value, reading.Quality)));
        Accepted++;
    }

    private void OnKnown(ReadingPack pack, Reading reading, double stored)
    {
        if (stored.Equals(reading.Value))
        {
            Duplicates++;
        }
        else
        {
            Conflicts.Add(new ReadingConflict(pack.Source, pack.Arrival, reading, stored));
        }
    }
}
