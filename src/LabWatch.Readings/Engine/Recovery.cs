using System.Data.Common;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;
using LabWatch.Readings.Journal;

namespace LabWatch.Readings.Engine;

/// <summary>Builds the head from the database: catalogue, then the journal rows whose readings are not sealed. Used at opening and after a failure.</summary>
internal sealed class Recovery(StoreDialect dialect, StoreWriter writer, HeadState head, StoreIncidents incidents, TimeProvider clock)
{
    private readonly List<JournalReading> _readings = [];
    private readonly Dictionary<(int Source, long Hour), (long Change, long Parts)> _sealedThrough = [];
    private readonly List<(HeadHour Hour, HeadChannel Channel)> _touched = [];
    private (HeadSource Source, long Start, HeadHour? Hour, long Through)? _recent;

    /// <summary>Journal rows taken over.</summary>
    public int Rows { get; private set; }

    /// <summary>Readings taken over.</summary>
    public long Readings { get; private set; }

    /// <summary>Last commit found.</summary>
    public long Last { get; private set; }

    /// <summary>Reads everything after a commit that the head has already (0 at opening).</summary>
    /// <param name="after">Last commit that the head has.</param>
    /// <param name="marked">Last commit that the mark beside the database knows.</param>
    public void Run(long after, long marked)
    {
        RecallIncidents();
        ReadCatalogue();
        long floor = writer.Connection.Number(null, StoreDialect.Floor);
        Last = Math.Max(after, Math.Max(floor, writer.Connection.Number(null, StoreDialect.LastSealedChange)));
        ReadJournal(Math.Max(after, floor));
        if (marked > Last)
        {
            ReportMissing(Last + 1, marked);
            Last = marked;
        }
    }

    private void RecallIncidents()
    {
        using DbDataReader reader = writer.Connection.Query(StoreDialect.AllSetAside);
        while (reader.Read())
        {
            incidents.Recall(reader.GetString(1), reader.GetInt64(2), reader.GetString(3));
        }
    }

    private void ReadCatalogue()
    {
        using (DbDataReader sources = writer.Connection.Query(StoreDialect.Sources))
        {
            while (sources.Read())
            {
                SourceKey key = new(sources.GetString(1), sources.GetString(2));
                HeadSource source = head.Find(key) ?? head.AddSource(key);
                Require(source.Id == sources.GetInt64(0));
            }
        }

        using DbDataReader channels = writer.Connection.Query(StoreDialect.Channels);
        while (channels.Read())
        {
            HeadSource source = head.Find(channels.GetInt64(0)) ?? throw new DamagedDataException("A channel belongs to no source.");
            string name = channels.GetString(2);
            HeadChannel channel = source.Find(name) ?? head.AddChannel(source, source.Channels.Count, name);
            Require(channel.Number == channels.GetInt64(1));
            if (!channels.IsDBNull(3))
            {
                channel.OfferNewest(
                    channels.GetInt64(3), BitConverter.Int64BitsToDouble(channels.GetInt64(4)), (ReadingQuality)(byte)channels.GetInt32(5));
            }
        }
    }

    private static void Require(bool consistent)
    {
        if (!consistent)
        {
            throw new DamagedDataException("The catalogue of sources and channels has gaps; restore it from a backup.");
        }
    }

    private void ReadJournal(long from)
    {
        long before = from;
        foreach (long change in RowNumbers(from))
        {
            while (incidents.Has(StoreIncidents.JournalKind, before + 1))
            {
                before++;
            }

            if (change > before + 1)
            {
                ReportMissing(before + 1, change - 1);
            }

            before = change;
            Last = Math.Max(Last, change);
            if (!incidents.Has(StoreIncidents.JournalKind, change))
            {
                TakeRow(change);
            }
        }
    }

    private List<long> RowNumbers(long from)
    {
        List<long> numbers = [];
        using DbDataReader reader = writer.Connection.Query(StoreDialect.JournalNumbersAfter, from);
        while (reader.Read())
        {
            numbers.Add(reader.GetInt64(0));
        }

        return numbers;
    }

    private void TakeRow(long change)
    {
        try
        {
            using DbDataReader reader = writer.Connection.Query(StoreDialect.JournalRow, change);
            if (reader.Read())
            {
                JournalRow.Read(change, reader.GetFieldValue<byte[]>(0), _readings);
            }
        }
        catch (DamagedDataException damage)
        {
            incidents.Report(StoreIncidents.JournalKind, change, damage.Message);
            return;
        }
        catch (DbException error) when (dialect.SaysDamaged(error))
        {
            incidents.Report(StoreIncidents.JournalKind, change, error.Message);
            return;
        }

        foreach (JournalReading reading in _readings)
        {
            Take(change, reading);
        }

        Publish(change);
        Rows++;
    }

    private void Take(long change, JournalReading reading)
    {
        HeadSource? source = head.Find(reading.Source);
        if (source is null || reading.Channel >= source.Channels.Count)
        {
            incidents.Report(StoreIncidents.JournalKind, change, "The journal row names a channel that is not in the catalogue.");
            return;
        }

        if (HourOf(source, reading.Time, change) is not { } hour)
        {
            return;
        }

        HeadChannel channel = source.Channels[reading.Channel];
        HeadColumn column = hour.Open?.Find(channel.Number) ?? head.AddColumn(hour.OpenPart(), channel.Number);
        if (!column.TryFind(reading.Time, out _) && column.Stage(reading.Time, reading.Value, reading.Quality))
        {
            _touched.Add((hour, channel));
        }
    }

    /// <summary>The hour that a reading of a commit belongs to; null where the commit is sealed already. Most often it is that of the reading before.</summary>
    private HeadHour? HourOf(HeadSource source, long time, long change)
    {
        if (_recent is not { } recent || !ReferenceEquals(recent.Source, source) || unchecked((ulong)(time - recent.Start)) >= Instant.MicrosecondsPerHour)
        {
            long start = new Instant(time).StartOfHour().Microseconds;
            recent = (source, start, source.Hours.GetValueOrDefault(start), SealedThrough(source, start).Change);
        }

        if (change > recent.Through && recent.Hour is null)
        {
            recent.Hour = head.AddHour(source, recent.Start);
            recent.Hour.Recover((int)SealedThrough(source, recent.Start).Parts);
        }

        _recent = recent;
        return change <= recent.Through ? null : recent.Hour;
    }

    private (long Change, long Parts) SealedThrough(HeadSource source, long hour)
    {
        if (!_sealedThrough.TryGetValue((source.Id, hour), out (long Change, long Parts) state))
        {
            state = writer.HourState(source.Id, hour);
            _sealedThrough.Add((source.Id, hour), state);
        }

        return state;
    }

    private void Publish(long change)
    {
        lock (head.Sync)
        {
            foreach ((HeadHour hour, HeadChannel channel) in _touched)
            {
                HeadColumn column = hour.Open!.Find(channel.Number)!;
                int added = column.Publish();
                hour.Open.OnPublished(added, change, clock.GetTimestamp());
                Readings += added;
                (long time, double value, ReadingQuality quality) = column.Latest();
                channel.OfferNewest(time, value, quality);
            }

            head.Change = Math.Max(head.Change, change);
        }

        _touched.Clear();
    }

    private void ReportMissing(long first, long last) => incidents.Report(
        StoreIncidents.MissingKind, first, FormattableString.Invariant($"Commits {first} to {last} were made durable and are gone from the database."));
}
