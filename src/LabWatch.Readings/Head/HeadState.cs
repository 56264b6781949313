using LabWatch.Lab.Identity;

namespace LabWatch.Readings.Head;

/// <summary>Everything the store keeps in memory. Structure changes and publishing happen under <see cref="Sync"/>; readers capture under it.</summary>
internal sealed class HeadState
{
    private const int IdleHoursKept = 32;

    private readonly Dictionary<SourceKey, HeadSource> _sources = [];
    private readonly List<HeadSource> _byId = [];
    private readonly Queue<HeadHour> _idle = [];

    public Lock Sync { get; } = new();

    /// <summary>Number of the last commit that is visible.</summary>
    public long Change { get; set; }

    /// <summary>Readings that are not sealed. Changed by the writing side only.</summary>
    public long Unsealed { get; set; }

    public IReadOnlyList<HeadSource> Sources => _byId;

    public HeadSource? Find(SourceKey key) => _sources.GetValueOrDefault(key);

    /// <summary>The source with an id; ids count from 1.</summary>
    public HeadSource? Find(long id) => id >= 1 && id <= _byId.Count ? _byId[(int)id - 1] : null;

    /// <summary>Forgets everything.</summary>
    public void Clear()
    {
        lock (Sync)
        {
            _sources.Clear();
            _byId.Clear();
            _idle.Clear();
            Change = 0;
            Unsealed = 0;
        }
    }

    public HeadSource AddSource(SourceKey key)
    {
        lock (Sync)
        {
            HeadSource source = new(_byId.Count + 1, key);
            _byId.Add(source);
            _sources.Add(key, source);
            return source;
        }
    }

    public void RemoveLastSource()
    {
        lock (Sync)
        {
            _sources.Remove(_byId[^1].Key);
            _byId.RemoveAt(_byId.Count - 1);
        }
    }

    public HeadChannel AddChannel(HeadSource source, int number, string name)
    {
        lock (Sync)
        {
            return source.Add(number, name);
        }
    }

    public HeadHour AddHour(HeadSource source, long hour)
    {
        lock (Sync)
        {
            HeadHour added = new(source, hour);
            source.Hours.Add(hour, added);
            _idle.Enqueue(added);
            return added;
        }
    }

    public HeadColumn AddColumn(HeadPart part, int channel)
    {
        lock (Sync)
        {
            return part.Column(channel);
        }
    }

    /// <summary>Notes that an hour became idle; call under <see cref="Sync"/>.</summary>
    public void OnIdle(HeadHour hour) => _idle.Enqueue(hour);

    /// <summary>Forgets all but the latest hours that have nothing unsealed. Call between commits, under <see cref="Sync"/>.</summary>
    public void ForgetIdle()
    {
        while (_idle.Count > IdleHoursKept)
        {
            HeadHour oldest = _idle.Dequeue();
            if (oldest.IsIdle && ReferenceEquals(oldest.Source.Hours.GetValueOrDefault(oldest.Hour), oldest))
            {
                oldest.Source.Hours.Remove(oldest.Hour);
                oldest.Source.Recent = null;
            }
        }
    }
}
