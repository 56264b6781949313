using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Remembers the latest readings of a channel by device time and value, so that a redelivery is recognised whatever order it comes in.
/// Sized to cover the age up to which hazards look at readings.
/// </summary>
internal sealed class RecentReadings
{
    private readonly (Instant Time, double Value)[] _ring;
    private int _next;
    private int _count;

    /// <summary>Makes room for the readings of a span.</summary>
    public RecentReadings(TimeSpan span, TimeSpan interval) =>
        _ring = new (Instant, double)[(int)Math.Clamp((span / interval) + 8, 16, 2048)];

    /// <summary>Whether this very reading was seen.</summary>
    public bool Contains(Instant time, double value)
    {
        for (int i = 0; i < _count; i++)
        {
            if (_ring[i].Time == time && _ring[i].Value == value)
            {
                return true;
            }
        }

        return false;
    }

    /// <summary>Remembers a reading, forgetting the oldest where full.</summary>
    public void Add(Instant time, double value)
    {
        _ring[_next] = (time, value);
        _next = (_next + 1) % _ring.Length;
        _count = Math.Min(_count + 1, _ring.Length);
    }
}
