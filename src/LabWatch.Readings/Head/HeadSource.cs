using LabWatch.Lab.Identity;

namespace LabWatch.Readings.Head;

/// <summary>A source known to the store: its channels and the hours that are in memory.</summary>
internal sealed class HeadSource(int id, SourceKey key)
{
    private readonly Dictionary<string, HeadChannel> _byName = new(StringComparer.Ordinal);
    private readonly List<HeadChannel> _channels = [];
    private HeadChannel[] _expected = [];

    public int Id { get; } = id;

    public SourceKey Key { get; } = key;

    public IReadOnlyList<HeadChannel> Channels => _channels;

    /// <summary>Hours in memory, by start.</summary>
    public SortedDictionary<long, HeadHour> Hours { get; } = [];

    /// <summary>The hour used last: the next reading is most often of the same.</summary>
    public HeadHour? Recent { get; set; }

    public HeadChannel? Find(string name) => _byName.GetValueOrDefault(name);

    /// <summary>
    /// Finds a channel by its place in the pack: devices send their channels in the same order again and again, so the channel met at
    /// this place last time is tried first.
    /// </summary>
    public HeadChannel? Find(string name, int place)
    {
        if (place < _expected.Length && _expected[place] is { } expected && string.Equals(expected.Name, name, StringComparison.Ordinal))
        {
            return expected;
        }

        HeadChannel? found = _byName.GetValueOrDefault(name);
        if (found is not null && place < 1024)
        {
            if (place >= _expected.Length)
            {
                Array.Resize(ref _expected, Math.Max(16, place * 2));
            }

            _expected[place] = found;
        }

        return found;
    }

    public HeadChannel Add(int number, string name)
    {
        HeadChannel channel = new(number, name);
        _channels.Add(channel);
        _byName.Add(name, channel);
        return channel;
    }

    /// <summary>Takes back the channel added last.</summary>
    public void RemoveLast()
    {
        _byName.Remove(_channels[^1].Name);
        _channels.RemoveAt(_channels.Count - 1);
        _expected = [];
    }
}
