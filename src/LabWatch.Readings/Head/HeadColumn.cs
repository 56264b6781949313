using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Head;

/// <summary>
/// The readings of one channel in one open part of an hour, in order of arrival. One appender stages and publishes; readers take a
/// <see cref="Snapshot"/> of what is published. Arrays only ever grow into new arrays, so a snapshot stays good.
/// </summary>
internal sealed class HeadColumn
{
    private const int InitialCapacity = 16;

    private long[] _times = new long[InitialCapacity];
    private double[] _values = new double[InitialCapacity];
    private ReadingQuality[] _qualities = new ReadingQuality[InitialCapacity];
    private Dictionary<long, int>? _places;
    private int _staged;
    private long _stagedLast = long.MinValue;
    private bool _stagedOrdered = true;
    private int _published;
    private long _publishedLast = long.MinValue;
    private bool _publishedOrdered = true;

    public int Published => _published;

    /// <summary>Bytes that the column occupies.</summary>
    public long Bytes => 160 + ((long)_times.Length * (sizeof(long) + sizeof(double) + 1)) + (_places is null ? 0 : 32L * _places.Count);

    /// <summary>Latest time, staged ones included.</summary>
    public long Last => _stagedLast;

    /// <summary>Finds the value of a time among staged and published readings.</summary>
    public bool TryFind(long time, out double value)
    {
        int at = time > _stagedLast ? -1
            : _places is not null ? _places.GetValueOrDefault(time, -1)
            : Array.BinarySearch(_times, 0, _staged, time);
        value = at >= 0 ? _values[at] : 0;
        return at >= 0;
    }

    /// <summary>Adds a reading that is not there yet; true where it opened the column's first place since the last publish.</summary>
    public bool Stage(long time, double value, ReadingQuality quality)
    {
        if (_staged == _times.Length)
        {
            Grow();
        }

        if (time < _stagedLast)
        {
            _stagedOrdered = false;
            _places ??= IndexAll();
        }

        _places?.Add(time, _staged);
        _times[_staged] = time;
        _values[_staged] = value;
        _qualities[_staged] = quality;
        _stagedLast = Math.Max(_stagedLast, time);
        return _staged++ == _published;
    }

    /// <summary>Makes what is staged visible; gives how many readings that were.</summary>
    public int Publish()
    {
        int added = _staged - _published;
        _published = _staged;
        _publishedLast = _stagedLast;
        _publishedOrdered = _stagedOrdered;
        return added;
    }

    /// <summary>Forgets what is staged.</summary>
    public void Rollback()
    {
        for (int i = _published; _places is not null && i < _staged; i++)
        {
            _places.Remove(_times[i]);
        }

        _staged = _published;
        _stagedLast = _publishedLast;
        _stagedOrdered = _publishedOrdered;
        _places = _stagedOrdered ? null : _places;
    }

    /// <summary>What is published now. Cheap: nothing is copied.</summary>
    public ColumnSnapshot Snapshot() => new(_times, _values, _qualities, _published, _publishedOrdered);

    /// <summary>The published reading with the latest time. There must be one.</summary>
    public (long Time, double Value, ReadingQuality Quality) Latest()
    {
        int at = _publishedOrdered ? _published - 1 : Array.IndexOf(_times, _publishedLast, 0, _published);
        return (_times[at], _values[at], _qualities[at]);
    }

    private Dictionary<long, int> IndexAll()
    {
        Dictionary<long, int> places = new(_staged + 1);
        for (int i = 0; i < _staged; i++)
        {
            places.Add(_times[i], i);
        }

        return places;
    }

    private void Grow()
    {
        int capacity = _times.Length * 2;
        Array.Resize(ref _times, capacity);
        Array.Resize(ref _values, capacity);
        Array.Resize(ref _qualities, capacity);
    }
}
