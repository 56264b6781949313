namespace LabWatch.Alerts.Outbox;

/// <summary>When to try again: exponential back-off, half of each wait random, so that many messages do not come back at once.</summary>
/// <param name="First">Wait after the first attempt.</param>
/// <param name="Longest">Longest wait.</param>
internal readonly record struct RetrySchedule(TimeSpan First, TimeSpan Longest)
{
    private const int LargestDoubling = 30;

    /// <summary>The wait after an attempt.</summary>
    /// <param name="attempts">Attempts made, 1 or more.</param>
    /// <param name="retryAfter">What the receiver asked for; obeyed up to <see cref="Longest"/>.</param>
    /// <param name="random">A number from 0 (inclusive) to 1 (exclusive).</param>
    public TimeSpan After(int attempts, TimeSpan? retryAfter, double random)
    {
        double full = Math.Min(First.TotalSeconds * Math.Pow(2, Math.Clamp(attempts - 1, 0, LargestDoubling)), Longest.TotalSeconds);
        double wait = full * (0.5 + (0.5 * random));
        double asked = Math.Clamp(retryAfter?.TotalSeconds ?? 0, 0, Longest.TotalSeconds);
        return TimeSpan.FromSeconds(Math.Max(wait, asked));
    }
}
