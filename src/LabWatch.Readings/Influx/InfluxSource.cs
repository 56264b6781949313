using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Influx;

/// <summary>A source: its hours in memory, the newest reading of each channel, and what its points begin with.</summary>
internal sealed class InfluxSource(SourceKey key)
{
    private readonly Dictionary<string, string> _lines = new(StringComparer.Ordinal);

    public SourceKey Key { get; } = key;

    public Dictionary<long, InfluxHour> Hours { get; } = [];

    /// <summary>The newest reading by channel; null until it was asked for.</summary>
    public Dictionary<string, Reading>? Newest { get; set; }

    /// <summary>What the points of a channel begin with.</summary>
    public string Line(string channel)
    {
        if (!_lines.TryGetValue(channel, out string? line))
        {
            _lines.Add(channel, line = InfluxLines.Channel(Key, channel));
        }

        return line;
    }

    /// <summary>Takes a reading as the newest of its channel where it is later.</summary>
    public void OfferNewest(Reading reading)
    {
        if (Newest is not null && (!Newest.TryGetValue(reading.Channel, out Reading known) || reading.Time.Microseconds > known.Time.Microseconds))
        {
            Newest[reading.Channel] = reading;
        }
    }
}
