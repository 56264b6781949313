namespace LabWatch.Alerts.Hazards;

/// <summary>What a check remembers; it outlives a change of the lab file. Guarded by the lock of its source.</summary>
internal sealed class CheckState
{
    /// <summary>Whether the condition stands, with its delays.</summary>
    public ConditionFilter Filter;

    /// <summary>The last verdict.</summary>
    public HazardVerdict Last { get; set; }

    /// <summary>Monotonic time stamp since when a source is hot; null while it is not.</summary>
    public long? HotSince { get; set; }
}
