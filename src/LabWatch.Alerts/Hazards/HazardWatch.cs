using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Messages;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Watches every reading for hazards as it arrives: in memory, without a store, without allocation while nothing is wrong. Any valid
/// sensor raises; an invalid or missing reading never lowers or ends anything. Thread-safe; one lock a source.
/// </summary>
internal sealed class HazardWatch : IReadingTap
{
    private readonly TimeProvider _clock;
    private readonly HazardRules _rules;
    private readonly HazardJudge _judge;
    private readonly IConditionSink _sink;
    private readonly ILogger _logger;
    private readonly IReadOnlyDictionary<ChannelKey, Instant> _heardBefore;
    private readonly Lock _changing = new();
    private volatile HazardMap _map = HazardMap.Empty;
    private long _packs;

    public HazardWatch(
        AlertsOptions options, TimeProvider clock, IConditionSink sink, IReadOnlyDictionary<ChannelKey, Instant> heardBefore, ILogger<HazardWatch> logger)
    {
        _clock = clock;
        _rules = HazardRules.From(options, clock);
        _sink = sink;
        _heardBefore = heardBefore;
        _logger = logger;
        _judge = new HazardJudge(_rules, clock, sink, new HazardTexts(new SiteTime(HazardMap.Empty.Snapshot.Site)));
    }

    /// <summary>Packs seen.</summary>
    public long Packs => Interlocked.Read(ref _packs);

    /// <summary>Readings of hazard channels that had no valid value.</summary>
    public long InvalidReadings => _judge.InvalidReadings;

    /// <summary>What cannot be watched as somebody may expect, under the present snapshot.</summary>
    public IReadOnlyList<Finding> Findings => _map.Findings();

    /// <summary>Takes a snapshot of the site into force. A standing hazard of a channel that is not watched any more returns, and says so.</summary>
    public void Apply(LabSnapshot snapshot)
    {
        lock (_changing)
        {
            HazardMap before = _map;
            HazardMap map = HazardMap.Build(
                snapshot, before, channel => ConditionDelays.Ticks(_rules.SilenceOf(channel.Interval), _clock), NewState, _clock);
            map.RefreshThermometers(Instant.Now(_clock));
            _judge.Texts = new HazardTexts(new SiteTime(snapshot.Site));
            _map = map;
            foreach (HazardChannel gone in before.Sources.Values.SelectMany(source => source.Channels).Where(channel => map.Find(channel.Key) is null))
            {
                Abandon(gone);
            }
        }
    }

    /// <summary>Looks up again which certificates are in force.</summary>
    public void RefreshThermometers() => _map.RefreshThermometers(Instant.Now(_clock));

    /// <summary>Takes over alerts that stand from before a restart, so that they return as if nothing had happened.</summary>
    public void Restore(IEnumerable<Alert> open)
    {
        foreach (Alert alert in open.Where(alert => alert.State is AlertState.RaisedUnacknowledged or AlertState.RaisedAcknowledged))
        {
            if (alert.Code is HazardCode.HotSurface or HazardCode.HazardSilent)
            {
                Restore(alert);
            }
        }
    }

    /// <inheritdoc/>
    public void OnPack(ReadingPack pack)
    {
        if (pack is null || !_map.Sources.TryGetValue(pack.Source, out HazardSource? source))
        {
            return;
        }

        Interlocked.Increment(ref _packs);
        try
        {
            Watch(source, pack);
        }
        catch (Exception exception)
        {
            // The tap never throws: a defect here must not stop the intake. The readings of this pack after the failing one go unwatched.
            Log.WatchFailed(_logger, pack.Source.ToString(), exception);
        }
    }

    /// <summary>Lets time pass: judges silence and on-delays. Called about once a second.</summary>
    public void Tick()
    {
        long now = _clock.GetTimestamp();
        Instant at = Instant.Now(_clock);
        foreach (HazardSource source in _map.Sources.Values)
        {
            lock (source.Gate)
            {
                foreach (HazardChannel channel in source.Channels)
                {
                    _judge.Tick(channel, now, at);
                }
            }
        }
    }

    /// <summary>The alert with the latest value of its sensor, where it is about a surface that stands above its limit.</summary>
    public Alert WithLatest(Alert alert)
    {
        bool standing = alert.State is AlertState.RaisedUnacknowledged or AlertState.RaisedAcknowledged;
        if (!standing || alert.Code != HazardCode.HotSurface
            || _map.Find(new ChannelKey(alert.Source, alert.Subject)) is not { Limit: { } limit } channel
            || double.IsNaN(channel.State.LastCelsius))
        {
            return alert;
        }

        double celsius = channel.State.LastCelsius;
        return alert with { Value = celsius, Limit = limit.Celsius, Headline = HazardTexts.HotSurfaceHeadline(channel, limit, celsius) };
    }

    /// <summary>When each hazard channel was last heard.</summary>
    public IReadOnlyDictionary<ChannelKey, Instant> LastHeard()
    {
        Dictionary<ChannelKey, Instant> heard = [];
        foreach (HazardChannel channel in _map.Sources.Values.SelectMany(source => source.Channels))
        {
            if (channel.State.LastHeard is { } at)
            {
                heard[channel.Key] = at;
            }
        }

        return heard;
    }

    private void Watch(HazardSource source, ReadingPack pack)
    {
        long now = _clock.GetTimestamp();
        IReadOnlyList<Reading> readings = pack.Readings;
        lock (source.Gate)
        {
            // Junctions first: the order of the channels in a pack says nothing.
            for (int i = 0; source.Junctions.Count > 0 && i < readings.Count; i++)
            {
                if (source.Junctions.TryGetValue(readings[i].Channel, out HazardJunction[]? junctions) && !_rules.IsOld(readings[i].Time, pack.Arrival))
                {
                    foreach (HazardJunction junction in junctions)
                    {
                        junction.Hear(readings[i]);
                    }
                }
            }

            for (int i = 0; i < readings.Count; i++)
            {
                Reading reading = readings[i];
                if (source.ById.TryGetValue(reading.Channel, out HazardChannel? channel))
                {
                    _judge.Watch(channel, reading, pack.Arrival, now);
                }
            }
        }
    }

    // The silence before a stop counts: the clock of a channel starts where it was last heard, as far as that is known.
    private HazardChannelState NewState(Channel channel)
    {
        bool known = _heardBefore.TryGetValue(channel.Key, out Instant heard);
        TimeSpan before = known ? Instant.Now(_clock) - heard : TimeSpan.Zero;
        long silentSince = _clock.GetTimestamp() - ConditionDelays.Ticks(before > TimeSpan.Zero ? before : TimeSpan.Zero, _clock);
        return new HazardChannelState(silentSince, known ? heard : null, new RecentReadings(_rules.OldestReading, channel.Interval));
    }

    private void Restore(Alert alert)
    {
        HazardMap map = _map;
        if (map.Find(new ChannelKey(alert.Source, alert.Subject)) is not { } channel)
        {
            string name = map.Snapshot.FindSource(alert.Source)?.Name ?? alert.Source.Source;
            _sink.Post(_judge.Texts.NotWatched(AlertKey.Of(alert), name, alert.Subject, Instant.Now(_clock)));
            return;
        }

        lock (map.Sources[alert.Source].Gate)
        {
            if (alert.Code == HazardCode.HotSurface)
            {
                channel.State.Hot.Restore(active: true);
            }
            else
            {
                channel.State.Silent = true;
            }
        }
    }

    private void Abandon(HazardChannel gone)
    {
        Instant at = Instant.Now(_clock);
        foreach ((bool standing, string code) in ((bool, string)[])[(gone.State.Hot.Active, HazardCode.HotSurface), (gone.State.Silent, HazardCode.HazardSilent)])
        {
            if (standing)
            {
                _sink.Post(_judge.Texts.NotWatched(new AlertKey(gone.Source.Key, code, gone.Channel.Id), gone.Source.Name, gone.Channel.Name, at));
            }
        }
    }
}
