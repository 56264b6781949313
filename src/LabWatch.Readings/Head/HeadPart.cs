namespace LabWatch.Readings.Head;

/// <summary>The part of a source-hour that is not sealed yet: one column a channel, by the channel's number in its source.</summary>
internal sealed class HeadPart(int part)
{
    private HeadColumn?[] _columns = new HeadColumn?[16];

    /// <summary>Number of the part: 0 for the first of the hour, more for supplements.</summary>
    public int Part { get; } = part;

    /// <summary>Commit that published its first reading; 0 before.</summary>
    public long FirstChange { get; private set; }

    /// <summary>Commit that published its last reading; 0 before.</summary>
    public long LastChange { get; private set; }

    /// <summary>Readings published.</summary>
    public int Readings { get; private set; }

    /// <summary>Monotonic time stamp of the last publish.</summary>
    public long Touched { get; private set; }

    /// <summary>Columns by channel number; null where the channel has none.</summary>
    public ReadOnlySpan<HeadColumn?> Columns => _columns;

    /// <summary>The column of a channel; null where it has none.</summary>
    public HeadColumn? Find(int channel) => channel >= 0 && channel < _columns.Length ? _columns[channel] : null;

    /// <summary>The column of a channel, made where there is none.</summary>
    public HeadColumn Column(int channel)
    {
        if (channel >= _columns.Length)
        {
            Array.Resize(ref _columns, Math.Max(_columns.Length * 2, channel + 1));
        }

        return _columns[channel] ??= new HeadColumn();
    }

    /// <summary>Bytes that the columns occupy.</summary>
    public long Bytes()
    {
        long bytes = 256;
        foreach (HeadColumn? column in _columns)
        {
            bytes += column?.Bytes ?? 0;
        }

        return bytes;
    }

    /// <summary>Counts readings that a commit published.</summary>
    public void OnPublished(int readings, long change, long timestamp)
    {
        FirstChange = FirstChange == 0 ? change : FirstChange;
        LastChange = change;
        Readings += readings;
        Touched = timestamp;
    }
}
