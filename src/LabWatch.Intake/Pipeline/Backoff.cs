namespace LabWatch.Intake.Pipeline;

/// <summary>Waits that double from a first to a longest one, each drawn between half and the whole, so that many do not retry in step.</summary>
internal sealed class Backoff(TimeSpan first, TimeSpan longest, Random random)
{
    private int _doublings;

    /// <summary>The next wait.</summary>
    public TimeSpan Next()
    {
        double whole = Math.Min(longest.TotalSeconds, first.TotalSeconds * (1L << _doublings));
        _doublings = Math.Min(_doublings + 1, 30);
        return TimeSpan.FromSeconds(whole * (0.5 + (0.5 * random.NextDouble())));
    }

    /// <summary>Starts again with the first wait.</summary>
    public void Reset() => _doublings = 0;
}
