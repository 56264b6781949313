using LabWatch.Alerts.LifeCycle;

namespace LabWatch.Alerts.Hazards;

/// <summary>A channel at or beyond a limit, always or only while the source is heated or hot.</summary>
/// <param name="key">Code and subject.</param>
/// <param name="channel">The channel.</param>
/// <param name="cause">What lies behind it.</param>
/// <param name="limit">The limit.</param>
/// <param name="above">Whether at and above the limit is the hazard; otherwise below it, or at and below it for a temperature.</param>
/// <param name="deadBand">How far the value must come back before it counts as gone.</param>
/// <param name="onDelay">The on-delay.</param>
/// <param name="heat">When the limit holds; null for always.</param>
internal sealed class ThresholdCheck(
    AlertKey key, HazardChannel channel, HazardCause cause, double limit, bool above, double deadBand, TimeSpan onDelay, SourceHeat? heat = null)
    : HazardCheck(key, channel, heat is null ? [channel] : [channel, .. heat.Inputs], onDelay)
{
    /// <inheritdoc/>
    public override HazardVerdict Judge(long now) => Judge(Subject.State.LastValue, heat?.Is ?? true);

    /// <inheritdoc/>
    public override HazardVerdict JudgeLate(double value) => Judge(value, heat?.Is ?? true);

    private HazardVerdict Judge(double value, bool holds)
    {
        bool beyond = above ? value >= limit : value < limit || (value == limit && cause == HazardCause.ColdSurface);
        bool back = above ? value < limit - deadBand : value > limit + deadBand;
        return new HazardVerdict(cause, beyond && holds, back || (!holds && !double.IsNaN(value)), value, limit, Subject.NaturalUnit, heat?.Celsius ?? double.NaN);
    }
}
