using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Hazards;

/// <summary>What is remembered of one hazard channel; it outlives a change of the lab file. Guarded by the lock of its source.</summary>
internal sealed class HazardChannelState(long silentSince, Instant? lastHeard, RecentReadings recent)
{
    /// <summary>Condition: at or above the surface limit.</summary>
    public ConditionFilter Hot;

    /// <summary>Readings seen lately.</summary>
    public RecentReadings Recent { get; } = recent;

    /// <summary>Monotonic time stamp of the last valid reading (of the start, moved back by the silence before it, where there was none yet).</summary>
    public long LastValid { get; set; } = silentSince;

    /// <summary>Arrival of the last valid reading; null where none is known.</summary>
    public Instant? LastHeard { get; set; } = lastHeard;

    /// <summary>Last valid temperature, degree Celsius; NaN where none is known.</summary>
    public double LastCelsius { get; set; } = double.NaN;

    /// <summary>Last valid value in the unit that the checks use; NaN where none is known.</summary>
    public double LastValue { get; set; } = double.NaN;

    /// <summary>The last minutes of a thermometer; null for what is none.</summary>
    public SensorHistory? History { get; init; }

    /// <summary>Newest device time seen, never later than its arrival.</summary>
    public Instant Newest { get; set; } = Instant.MinValue;

    /// <summary>Whether a silence stands.</summary>
    public bool Silent { get; set; }

    /// <summary>Whether the standing silence is one of readings that come, but too old to judge by.</summary>
    public bool OnlyOld { get; set; }

    /// <summary>Monotonic time stamp from which on only old readings came; null while fresh ones come.</summary>
    public long? OldSince { get; set; }
}
