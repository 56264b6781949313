namespace LabWatch.Alerts.Hazards;

/// <summary>When somebody last looked after a source: a run, an acknowledgement, a planned soak. Guarded by the lock of its source.</summary>
internal sealed class HazardAttention
{
    /// <summary>Monotonic time stamp; null where nobody has since the start.</summary>
    public long? Last { get; private set; }

    /// <summary>Notes attention up to a moment. An earlier one changes nothing.</summary>
    public void Note(long timestamp) => Last = Last is { } last && last > timestamp ? last : timestamp;
}
