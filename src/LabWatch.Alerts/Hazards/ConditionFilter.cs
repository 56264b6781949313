namespace LabWatch.Alerts.Hazards;

/// <summary>
/// De-bounces one condition with an on-delay and an off-delay (IEC 62682 alarm attributes). Times are monotonic time stamps of the clock
/// given. Silence never lowers: only <see cref="Observe"/> can return, and only a reading that counts as low starts or ends an off-delay.
/// </summary>
internal struct ConditionFilter
{
    private long? _highSince;
    private long? _lowSince;

    /// <summary>Whether the condition stands.</summary>
    public bool Active { get; private set; }

    /// <summary>Puts the filter into a known state, for example after a restart.</summary>
    public void Restore(bool active)
    {
        Active = active;
        _highSince = null;
        _lowSince = null;
    }

    /// <summary>Takes one valid reading.</summary>
    /// <param name="high">At or above the limit.</param>
    /// <param name="low">Below the limit by the dead-band.</param>
    /// <param name="mayLower">Whether the reading is newer than all before; an older one can raise but never lower.</param>
    /// <param name="now">Monotonic time stamp.</param>
    /// <param name="delays">The delays.</param>
    public ConditionEdge Observe(bool high, bool low, bool mayLower, long now, ConditionDelays delays) =>
        Active ? ObserveActive(low, mayLower, now, delays) : ObserveInactive(high, mayLower, now, delays);

    /// <summary>Lets time pass: a condition within its on-delay is raised even if no further reading comes.</summary>
    public ConditionEdge Tick(long now, ConditionDelays delays) =>
        !Active && _highSince is { } since && now - since >= delays.On ? Raise() : ConditionEdge.None;

    private ConditionEdge ObserveInactive(bool high, bool mayLower, long now, ConditionDelays delays)
    {
        if (high)
        {
            _highSince ??= now;
            return now - _highSince.Value >= delays.On ? Raise() : ConditionEdge.None;
        }

        _highSince = mayLower ? null : _highSince;
        return ConditionEdge.None;
    }

    private ConditionEdge ObserveActive(bool low, bool mayLower, long now, ConditionDelays delays)
    {
        if (!low)
        {
            _lowSince = null;
            return ConditionEdge.None;
        }

        if (!mayLower)
        {
            return ConditionEdge.None;
        }

        _lowSince ??= now;
        if (now - _lowSince.Value < delays.Off)
        {
            return ConditionEdge.None;
        }

        Restore(active: false);
        return ConditionEdge.Returned;
    }

    private ConditionEdge Raise()
    {
        Restore(active: true);
        return ConditionEdge.Raised;
    }
}
