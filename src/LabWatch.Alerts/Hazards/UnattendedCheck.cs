using LabWatch.Alerts.LifeCycle;

namespace LabWatch.Alerts.Hazards;

/// <summary>A source that has been hot for a set time without a run, a planned soak, or anybody's attention.</summary>
/// <param name="key">Code and subject.</param>
/// <param name="subject">The channel that it is told about.</param>
/// <param name="heat">Whether it is hot.</param>
/// <param name="limitCelsius">From when on it is.</param>
/// <param name="patience">The set time, monotonic ticks.</param>
/// <param name="minutes">The set time in minutes.</param>
/// <param name="attention">When somebody last looked after it, monotonic time stamp; null where never, since the start.</param>
internal sealed class UnattendedCheck(
    AlertKey key, HazardChannel subject, SourceHeat heat, double limitCelsius, long patience, double minutes, Func<long?> attention)
    : HazardCheck(key, subject, heat.Inputs, TimeSpan.Zero)
{
    /// <inheritdoc/>
    public override bool OnTicks => true;

    /// <inheritdoc/>
    public override HazardVerdict Judge(long now)
    {
        if (!heat.Is)
        {
            State.HotSince = null;
            return new HazardVerdict(HazardCause.UnattendedHot, false, !double.IsNaN(heat.Celsius), heat.Celsius, limitCelsius, "Cel", minutes);
        }

        State.HotSince ??= now;
        long since = Math.Max(State.HotSince.Value, attention() ?? long.MinValue);
        bool alone = now - since >= patience;
        return new HazardVerdict(HazardCause.UnattendedHot, alone, !alone, heat.Celsius, limitCelsius, "Cel", minutes);
    }
}
