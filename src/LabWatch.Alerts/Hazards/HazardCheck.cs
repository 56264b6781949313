using LabWatch.Alerts.LifeCycle;

namespace LabWatch.Alerts.Hazards;

/// <summary>One hazard of a source that is judged on its readings. The caller holds the lock of the source.</summary>
/// <param name="key">Code and subject.</param>
/// <param name="subject">The channel that it is told about.</param>
/// <param name="inputs">The channels that it is judged by.</param>
/// <param name="onDelay">How long the condition must be seen before it is raised.</param>
internal abstract class HazardCheck(AlertKey key, HazardChannel subject, IReadOnlyList<HazardChannel> inputs, TimeSpan onDelay)
{
    public AlertKey Key { get; } = key;

    public HazardChannel Subject { get; } = subject;

    public IReadOnlyList<HazardChannel> Inputs { get; } = inputs;

    public TimeSpan OnDelay { get; } = onDelay;

    /// <summary>The delays in ticks of the clock; set when the check is put into the map.</summary>
    public ConditionDelays Delays { get; set; }

    /// <summary>What it remembers; set when the check is put into the map.</summary>
    public CheckState State { get; set; } = new();

    /// <summary>Whether a reading of the pack that is being watched touches it.</summary>
    public bool Touched { get; set; }

    /// <summary>Whether it is judged when time passes, too.</summary>
    public virtual bool OnTicks => false;

    /// <summary>Judges the latest readings.</summary>
    /// <param name="now">Monotonic time stamp.</param>
    public abstract HazardVerdict Judge(long now);

    /// <summary>Judges one reading that came late: it may raise, never lower. Only a check of a single channel can.</summary>
    /// <param name="value">The value in the unit that the watch uses.</param>
    public virtual HazardVerdict JudgeLate(double value) => default;
}
