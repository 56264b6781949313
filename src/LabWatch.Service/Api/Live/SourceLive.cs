using LabWatch.Lab.Readings;

namespace LabWatch.Service.Api.Live;

/// <summary>The newest reading of each channel of one source. Safe for many threads.</summary>
internal sealed class SourceLive
{
    private readonly Lock _gate = new();
    private readonly Dictionary<string, Reading> _newest = new(StringComparer.Ordinal);
    private long? _heardAt;

    /// <summary>Keeps the readings that are newer than what is kept.</summary>
    public void Take(IReadOnlyList<Reading> readings, long timestamp)
    {
        lock (_gate)
        {
            _heardAt = timestamp;
            foreach (Reading reading in readings)
            {
                if (!_newest.TryGetValue(reading.Channel, out Reading kept) || reading.Time >= kept.Time)
                {
                    _newest[reading.Channel] = reading;
                }
            }
        }
    }

    /// <summary>Whether nothing was heard for a while.</summary>
    public bool IsDue(TimeProvider clock, TimeSpan after)
    {
        lock (_gate)
        {
            return _heardAt is not { } heard || clock.GetElapsedTime(heard) >= after;
        }
    }

    /// <summary>A copy of what is kept.</summary>
    public IReadOnlyDictionary<string, Reading> Snapshot()
    {
        lock (_gate)
        {
            return new Dictionary<string, Reading>(_newest, StringComparer.Ordinal);
        }
    }
}
