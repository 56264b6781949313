using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Messages;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Watches every reading for hazards as it arrives: in memory, without a store, without allocation while nothing is wrong. Any valid
/// sensor raises; an invalid or missing reading never lowers or ends anything. Thread-safe; one lock a source.
/// </summary>
internal sealed class HazardWatch : IReadingTap
{
    private static readonly Estimate UnknownRoom = new(23, 4);
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
                snapshot, before, channel => ConditionDelays.Ticks(_rules.SilenceOf(channel.Interval), _clock), NewState, _clock, _rules.OffDelay);
            map.RefreshThermometers(Instant.Now(_clock));
            _judge.Texts = new HazardTexts(new SiteTime(snapshot.Site));
            _map = map;
            foreach (HazardChannel gone in before.Sources.Values.SelectMany(source => source.Channels).Where(channel => map.Find(channel.Key) is null))
            {
                Abandon(gone);
            }

            foreach (HazardCheck gone in before.Sources.Values.SelectMany(source => source.Checks).Where(check => check.State.Filter.Active && map.Find(check.Key) is null))
            {
                _sink.Post(_judge.Texts.NotWatched(gone.Key, gone.Subject.Source.Name, gone.Subject.Channel.Name, Instant.Now(_clock)));
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
            else if (alert.IsHazard)
            {
                RestoreCheck(alert);
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

    /// <summary>Notes that somebody looks after a source, up to a moment: now, or the end of a planned soak.</summary>
    public void Attend(SourceKey source, Instant until)
    {
        if (_map.Sources.TryGetValue(source, out HazardSource? attended))
        {
            TimeSpan ahead = until - Instant.Now(_clock);
            lock (attended.Gate)
            {
                attended.Attention.Note(_clock.GetTimestamp() + ConditionDelays.Ticks(ahead > TimeSpan.Zero ? ahead : TimeSpan.Zero, _clock));
            }
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

                _judge.Tick(source, now, at);
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
        return alert with
        {
            Value = celsius,
            Limit = limit.Celsius,
            Headline = HazardTexts.HotSurfaceHeadline(channel, limit, celsius),
            Outlook = HazardTexts.Outlook(Forecast(channel, limit), limit.Celsius),
        };
    }

    // A sensor that is not heard cannot be foretold. The air of the room is known to a kelvin (common practice, no source), or hardly at all.
    private CoolingForecast? Forecast(HazardChannel channel, SurfaceLimit limit)
    {
        HazardSource source = _map.Sources[channel.Source.Key];
        lock (source.Gate)
        {
            double ambient = source.Channels.FirstOrDefault(one => one.Channel.Quantity == ChannelQuantity.AmbientTemperature)?.State.LastValue ?? double.NaN;
            return channel.IsHeardBy(_clock.GetTimestamp())
                ? channel.State.History?.Forecast(double.IsNaN(ambient) ? UnknownRoom : new Estimate(ambient, 1), limit.Celsius)
                : null;
        }
    }

    /// <summary>When each hazard channel was last heard.</summary>
    public IReadOnlyDictionary<ChannelKey, Instant> LastHeard()
    {
        Dictionary<ChannelKey, Instant> heard = [];
        foreach (HazardChannel channel in _map.Sources.Values.SelectMany(source => source.Channels))
        {
            if (channel.IsSilenceWatched && channel.State.LastHeard is { } at)
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
                    if (_judge.Watch(channel, reading, pack.Arrival, now))
                    {
                        Touch(channel.JointChecks);
                    }
                }
            }

            // What several channels tell together is judged once a pack, when all of them are up to date.
            foreach (HazardCheck check in source.Checks)
            {
                if (check.Touched)
                {
                    check.Touched = false;
                    _judge.Judge(check, pack.Arrival, now);
                }
            }
        }
    }

    private static void Touch(HazardCheck[] checks)
    {
        foreach (HazardCheck check in checks)
        {
            check.Touched = true;
        }
    }

    // The silence before a stop counts: the clock of a channel starts where it was last heard, as far as that is known.
    private HazardChannelState NewState(Channel channel)
    {
        bool known = _heardBefore.TryGetValue(channel.Key, out Instant heard);
        TimeSpan before = known ? Instant.Now(_clock) - heard : TimeSpan.Zero;
        long silentSince = _clock.GetTimestamp() - ConditionDelays.Ticks(before > TimeSpan.Zero ? before : TimeSpan.Zero, _clock);
        return new HazardChannelState(silentSince, known ? heard : null, new RecentReadings(_rules.OldestReading, channel.Interval))
        {
            History = channel.Unit is "Cel" or "Ohm" or "mV" ? new SensorHistory() : null,
        };
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

    private void RestoreCheck(Alert alert)
    {
        HazardMap map = _map;
        if (map.Find(AlertKey.Of(alert)) is not { } check)
        {
            ReferenceSource? source = map.Snapshot.FindSource(alert.Source);
            string channel = source?.FindChannel(alert.Subject)?.Name ?? alert.Subject;
            _sink.Post(_judge.Texts.NotWatched(AlertKey.Of(alert), source?.Name ?? alert.Source.Source, channel, Instant.Now(_clock)));
            return;
        }

        lock (map.Sources[alert.Source].Gate)
        {
            check.State.Filter.Restore(active: true);
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
