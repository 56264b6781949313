using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Planning;

/// <summary>
/// The hours in which readings arrived and that have not been looked at since. The change number that is safe to store lies before the
/// oldest of them, so that after a crash the store names them again. Safe for several threads.
/// </summary>
internal sealed class PendingHours(TimeProvider clock)
{
    private readonly Dictionary<(SourceKey Source, Instant Hour), Entry> _hours = [];
    private readonly Lock _lock = new();
    private long _change;

    /// <summary>The change number to ask the store from.</summary>
    public long Change
    {
        get
        {
            lock (_lock)
            {
                return _change;
            }
        }
    }

    /// <summary>Number of hours waiting.</summary>
    public int Count
    {
        get
        {
            lock (_lock)
            {
                return _hours.Count;
            }
        }
    }

    /// <summary>The change number that may be stored: everything up to it has been dealt with.</summary>
    public long SafeChange
    {
        get
        {
            lock (_lock)
            {
                return _hours.Count == 0 ? _change : _hours.Values.Min(entry => entry.After);
            }
        }
    }

    /// <summary>Begins after a stored change number, or again at 0 where the store has been replaced by another.</summary>
    public void StartAfter(long change)
    {
        lock (_lock)
        {
            _hours.Clear();
            _change = change;
        }
    }

    /// <summary>Takes up the hours that changed since <see cref="Change"/>, up to a change number.</summary>
    public void Note(long change, IReadOnlyList<(SourceKey Source, Instant Hour)> hours)
    {
        lock (_lock)
        {
            long now = clock.GetTimestamp();
            foreach ((SourceKey, Instant) hour in hours)
            {
                long after = _hours.TryGetValue(hour, out Entry known) ? known.After : _change;
                _hours[hour] = new Entry(after, now);
            }

            _change = change;
        }
    }

    /// <summary>Whether a span of a source touches a waiting hour, one of <paramref name="except"/> apart.</summary>
    public bool Touches(SourceKey source, TimeWindow span, IReadOnlySet<Instant> except)
    {
        lock (_lock)
        {
            for (Instant hour = span.Start.StartOfHour(); hour < span.End; hour += TimeSpan.FromHours(1))
            {
                if (_hours.ContainsKey((source, hour)) && !except.Contains(hour))
                {
                    return true;
                }
            }

            return false;
        }
    }

    /// <summary>The oldest hours of a source that have been quiet for a time, at most a number of them, in rising order.</summary>
    public IReadOnlyList<Instant> Quiet(SourceKey source, TimeSpan quiet, int count)
    {
        lock (_lock)
        {
            return [.. _hours
                .Where(pair => pair.Key.Source == source && clock.GetElapsedTime(pair.Value.ChangedAt) >= quiet)
                .Select(pair => pair.Key.Hour)
                .Order()
                .Take(count)];
        }
    }

    /// <summary>Forgets hours that have been dealt with.</summary>
    public void Done(SourceKey source, IEnumerable<Instant> hours)
    {
        lock (_lock)
        {
            foreach (Instant hour in hours)
            {
                _hours.Remove((source, hour));
            }
        }
    }

    /// <summary>Forgets the hours of sources that are not configured (any more).</summary>
    public void KeepOnly(IReadOnlySet<SourceKey> sources)
    {
        lock (_lock)
        {
            foreach ((SourceKey Source, Instant Hour) key in _hours.Keys.Where(key => !sources.Contains(key.Source)).ToList())
            {
                _hours.Remove(key);
            }
        }
    }

    private readonly record struct Entry(long After, long ChangedAt);
}
