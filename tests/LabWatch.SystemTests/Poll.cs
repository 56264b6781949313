namespace LabWatch.SystemTests;

/// <summary>Waits for a condition of something outside this process, up to a deadline.</summary>
internal static class Poll
{
    private static readonly TimeSpan Pause = TimeSpan.FromMilliseconds(50);

    /// <summary>Asks until the answer is yes. Throws <see cref="TimeoutException"/> with what was last seen when the deadline has passed.</summary>
    public static async Task UntilAsync(
        string what, Func<Task<bool>> condition, TimeSpan deadline, CancellationToken cancellationToken, Func<string>? seen = null)
    {
        long start = TimeProvider.System.GetTimestamp();
        while (!await condition())
        {
            if (TimeProvider.System.GetElapsedTime(start) > deadline)
            {
                throw new TimeoutException($"After {deadline.TotalSeconds} s it is still not so that {what}. {seen?.Invoke()}");
            }

            await Task.Delay(Pause, TimeProvider.System, cancellationToken);
        }
    }
}
