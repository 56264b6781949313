using LabWatch.Alerts.Messages;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Hazards;

/// <summary>Judges one channel at a time; the caller holds the lock of its source.</summary>
internal sealed class HazardJudge(HazardRules rules, TimeProvider clock, IConditionSink sink, HazardTexts texts)
{
    private const ReadingQuality Invalid = ReadingQuality.NoValue | ReadingQuality.OutsideSensorRange;

    private readonly long _started = clock.GetTimestamp();
    private volatile HazardTexts _texts = texts;
    private long _invalid;

    /// <summary>The words for what is found; replaced with the lab file.</summary>
    public HazardTexts Texts
    {
        get => _texts;
        set => _texts = value;
    }

    /// <summary>Readings that had no valid value.</summary>
    public long InvalidReadings => Interlocked.Read(ref _invalid);

    /// <summary>Judges one reading. Whether it is the newest valid one of its channel.</summary>
    public bool Watch(HazardChannel channel, in Reading reading, Instant arrival, long now)
    {
        double celsius = channel.Thermometer.Celsius(reading.Value);
        bool meansNothing = channel.Limit is not null && channel.Thermometer.Usable && double.IsNaN(celsius);
        if ((reading.Quality & Invalid) != 0 || !channel.IsPossible(reading.Value) || meansNothing)
        {
            Interlocked.Increment(ref _invalid);
            return false;
        }

        HazardChannelState state = channel.State;
        if (rules.IsOld(reading.Time, arrival))
        {
            HearOld(channel, arrival, now);
            return false;
        }

        bool inOrder = reading.Time > state.Newest && reading.Time <= arrival;
        if (!inOrder && state.Recent.Contains(reading.Time, reading.Value))
        {
            return false;
        }

        state.Recent.Add(reading.Time, reading.Value);
        state.OldSince = null;
        Hear(channel, arrival, now);
        bool newest = reading.Time > state.Newest;
        if (newest)
        {
            // A device clock that runs ahead must not hide what comes after it is put right.
            state.Newest = reading.Time < arrival ? reading.Time : arrival;
            state.LastCelsius = celsius;
            state.LastValue = channel.ToNatural(reading.Value);
            state.History?.Add(Seconds(now), state.LastValue);
        }

        if (channel.Limit is { } limit && !double.IsNaN(celsius))
        {
            WatchSurface(channel, limit, celsius, reading.Value, newest, arrival, now);
        }

        foreach (HazardCheck check in channel.OwnChecks)
        {
            HazardVerdict verdict = newest ? check.Judge(now) : check.JudgeLate(channel.ToNatural(reading.Value));
            Conclude(check, verdict, newest, arrival, now);
        }

        return newest;
    }

    /// <summary>A monotonic time stamp in seconds.</summary>
    public double Seconds(long timestamp) => (double)timestamp / clock.TimestampFrequency;

    /// <summary>Judges a check by the latest readings of all its channels.</summary>
    public void Judge(HazardCheck check, Instant at, long now) => Conclude(check, check.Judge(now), newest: true, at, now);

    private void Conclude(HazardCheck check, HazardVerdict verdict, bool newest, Instant at, long now)
    {
        CheckState state = check.State;
        if (newest || verdict.Present)
        {
            state.Last = verdict;
        }

        switch (state.Filter.Observe(verdict.Present, verdict.Absent, newest, now, check.Delays))
        {
            case ConditionEdge.Raised:
                sink.Post(Texts.Found(check, verdict, at));
                break;
            case ConditionEdge.Returned:
                sink.Post(Texts.Gone(check, verdict, at));
                break;
            default:
                break;
        }
    }

    /// <summary>Judges what time alone brings to a check: an on-delay that has passed, or a source that nobody looks after.</summary>
    public void Tick(HazardSource source, long now, Instant at)
    {
        foreach (HazardCheck check in source.TickChecks)
        {
            Judge(check, at, now);
        }

        foreach (HazardCheck check in source.Checks)
        {
            if (check.State.Filter.Tick(now, check.Delays) == ConditionEdge.Raised)
            {
                sink.Post(Texts.Found(check, check.State.Last, at));
            }
        }
    }

    private void WatchSurface(HazardChannel channel, SurfaceLimit limit, double celsius, double raw, bool newest, Instant at, long now)
    {
        switch (channel.State.Hot.Observe(celsius >= limit.Celsius, celsius < limit.Celsius - rules.DeadBandKelvin, newest, now, rules.HotDelays))
        {
            case ConditionEdge.Raised:
                sink.Post(Texts.HotSurface(channel, limit, celsius, raw, at));
                break;
            case ConditionEdge.Returned:
                sink.Post(Texts.HotSurfaceReturned(channel, limit, celsius, raw, at));
                break;
            default:
                break;
        }
    }

    private void HearOld(HazardChannel channel, Instant arrival, long now)
    {
        channel.State.OldSince ??= now;
        if (!channel.State.OnlyOld)
        {
            Hear(channel, arrival, now);
        }
    }

    private void Hear(HazardChannel channel, Instant arrival, long now)
    {
        HazardChannelState state = channel.State;
        state.LastValid = now;
        state.LastHeard = arrival;
        if (state.Silent)
        {
            state.Silent = false;
            state.OnlyOld = false;
            sink.Post(Texts.SilenceEnded(channel, arrival));
        }
    }

    /// <summary>Judges what time alone brings: silence, and on-delays that have passed.</summary>
    public void Tick(HazardChannel channel, long now, Instant at)
    {
        HazardChannelState state = channel.State;
        if (channel.Limit is { } limit && state.Hot.Tick(now, rules.HotDelays) == ConditionEdge.Raised)
        {
            sink.Post(Texts.HotSurface(channel, limit, state.LastCelsius, double.NaN, at));
        }

        if (!channel.IsSilenceWatched || state.Silent || now - _started < rules.StartGrace)
        {
            return;
        }

        if (now - state.LastValid >= channel.Silence)
        {
            state.Silent = true;
            sink.Post(Texts.Silent(channel, clock.GetElapsedTime(state.LastValid, now), at));
        }
        else if (state.OldSince is { } since && now - since >= Math.Max(channel.Silence, rules.OldTicks))
        {
            state.Silent = true;
            state.OnlyOld = true;
            sink.Post(Texts.OnlyOld(channel, rules.OldestReading, at));
        }
    }
}
