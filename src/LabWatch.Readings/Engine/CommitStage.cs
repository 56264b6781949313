using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Head;
using LabWatch.Readings.Journal;

namespace LabWatch.Readings.Engine;

/// <summary>
/// One commit while it is being made: sorts readings into new, repeated and conflicting, puts the new ones behind what is published, and
/// writes the journal row. Nothing is visible until <see cref="Publish"/>; <see cref="Rollback"/> forgets it all.
/// </summary>
internal sealed class CommitStage(HeadState head, IHourLoader loader)
{
    private readonly JournalRow _row = new();
    private readonly List<(HeadPart Part, HeadChannel Channel, HeadColumn Column)> _touched = [];
    private readonly List<HeadSource> _newSources = [];
    private readonly List<(HeadSource Source, HeadChannel Channel)> _newChannels = [];
    private List<ReadingConflict>? _conflicts;

    public int Accepted { get; private set; }

    public int Duplicates { get; private set; }

    public IReadOnlyList<ReadingConflict> Conflicts => _conflicts ?? (IReadOnlyList<ReadingConflict>)[];

    public IReadOnlyList<HeadSource> NewSources => _newSources;

    public IReadOnlyList<(HeadSource Source, HeadChannel Channel)> NewChannels => _newChannels;

    /// <summary>Stages packs. Throws what the database throws; then call <see cref="Rollback"/>.</summary>
    public void Stage(IReadOnlyList<ReadingPack> packs)
    {
        Clear();
        _row.Begin();
        for (int p = 0; p < packs.Count; p++)
        {
            ReadingPack pack = packs[p];
            HeadSource source = head.Find(pack.Source) ?? AddSource(pack.Source);
            _row.BeginPack(source.Id);
            switch (pack.Readings)
            {
                case Reading[] array:
                    StagePack(source, pack, array);
                    break;
                case List<Reading> list:
                    StagePack(source, pack, System.Runtime.InteropServices.CollectionsMarshal.AsSpan(list));
                    break;
                default:
                    StagePack(source, pack, pack.Readings.ToArray());
                    break;
            }
        }
    }

    /// <summary>The journal row of this commit.</summary>
    public byte[] FinishRow(long change) => _row.Finish(change);

    /// <summary>Makes the commit visible, all at once.</summary>
    public void Publish(long change, long timestamp)
    {
        lock (head.Sync)
        {
            foreach ((HeadPart part, HeadChannel channel, HeadColumn column) in _touched)
            {
                part.OnPublished(column.Publish(), change, timestamp);
                (long time, double value, ReadingQuality quality) = column.Latest();
                channel.OfferNewest(time, value, quality);
            }

            head.Change = change;
            head.ForgetIdle();
        }
    }

    /// <summary>Forgets what was staged.</summary>
    public void Rollback()
    {
        foreach ((_, _, HeadColumn column) in _touched)
        {
            column.Rollback();
        }

        lock (head.Sync)
        {
            for (int i = _newChannels.Count - 1; i >= 0; i--)
            {
                _newChannels[i].Source.RemoveLast();
            }

            head.ForgetIdle();
        }

        for (int i = _newSources.Count - 1; i >= 0; i--)
        {
            head.RemoveLastSource();
        }

        Clear();
    }

    private void StagePack(HeadSource source, ReadingPack pack, ReadOnlySpan<Reading> readings)
    {
        for (int i = 0; i < readings.Length; i++)
        {
            ref readonly Reading reading = ref readings[i];
            long time = reading.Time.Microseconds;
            HeadChannel channel = source.Find(reading.Channel, i) ?? AddChannel(source, reading.Channel);
            HeadHour hour = source.Recent is { IsLoaded: true } recent && unchecked((ulong)(time - recent.Hour)) < Instant.MicrosecondsPerHour
                ? recent
                : HourOf(source, reading.Time.StartOfHour().Microseconds);
            HeadColumn? column = hour.Open?.Find(channel.Number);
            if (hour.TryFind(channel, column, time, out double stored))
            {
                OnKnown(pack, in reading, stored);
                continue;
            }

            HeadPart part = hour.OpenPart();
            column ??= head.AddColumn(part, channel.Number);
            if (column.Stage(time, reading.Value, reading.Quality))
            {
                _touched.Add((part, channel, column));
            }

            _row.Add(channel.Number, time, reading.Value, reading.Quality);
            Accepted++;
        }
    }

    private void OnKnown(ReadingPack pack, in Reading reading, double stored)
    {
        if (stored.Equals(reading.Value))
        {
            Duplicates++;
        }
        else
        {
            (_conflicts ??= []).Add(new ReadingConflict(pack.Source, pack.Arrival, reading, stored));
        }
    }

    private HeadHour HourOf(HeadSource source, long start)
    {
        if (!source.Hours.TryGetValue(start, out HeadHour? hour))
        {
            hour = head.AddHour(source, start);
        }

        if (!hour.IsLoaded)
        {
            loader.Load(hour);
        }

        source.Recent = hour;
        return hour;
    }

    private HeadSource AddSource(SourceKey key)
    {
        HeadSource source = head.AddSource(key);
        _newSources.Add(source);
        return source;
    }

    private HeadChannel AddChannel(HeadSource source, string name)
    {
        HeadChannel channel = head.AddChannel(source, source.Channels.Count, name);
        _newChannels.Add((source, channel));
        return channel;
    }

    private void Clear()
    {
        _touched.Clear();
        _newSources.Clear();
        _newChannels.Clear();
        _conflicts = null;
        Accepted = 0;
        Duplicates = 0;
    }
}
