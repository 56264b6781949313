namespace LabWatch.Readings.Engine;

/// <summary>
/// Decides which hours to seal: those that are over and quiet; when too much lies in memory the quietest, when the journal is too long
/// those that hold its oldest rows. Sealing early costs a further part in that hour, nothing else.
/// </summary>
internal static class SealPolicy
{
    /// <summary>A supplement waits this many quiet periods longer, so that trickling late readings share one.</summary>
    private const int SupplementPatience = 5;

    /// <summary>Hours that took a reading within this time are left alone while others can make room.</summary>
    private static readonly TimeSpan Busy = TimeSpan.FromSeconds(5);

    public static IReadOnlyList<SealCandidate> Choose(
        IReadOnlyList<SealCandidate> candidates, ReadingsOptions options, long journalBytes, long floor, long change)
    {
        HashSet<SealCandidate> chosen = [.. candidates.Where(one => IsDue(one, options.QuietPeriod))];
        long unsealed = candidates.Sum(one => (long)one.Readings) - chosen.Sum(one => (long)one.Readings);
        if (unsealed > options.UnsealedReadingsLimit)
        {
            MakeRoom(candidates, chosen, unsealed, options.UnsealedReadingsLimit / 2);
        }

        if (journalBytes > options.JournalBytesLimit)
        {
            long middle = floor + ((change - floor) / 2);
            chosen.UnionWith(candidates.Where(one => one.FirstChange <= middle));
        }

        return [.. chosen.OrderBy(one => one.Hour.Hour)];
    }

    private static bool IsDue(SealCandidate one, TimeSpan quietPeriod) =>
        one.IsOver && one.Quiet >= (one.Part == 0 ? quietPeriod : quietPeriod * SupplementPatience);

    private static void MakeRoom(IReadOnlyList<SealCandidate> candidates, HashSet<SealCandidate> chosen, long unsealed, long target)
    {
        IEnumerable<SealCandidate> quietestFirst = candidates
            .OrderByDescending(one => one.Quiet >= Busy ? one.Quiet : TimeSpan.Zero)
            .ThenBy(one => one.Hour.Hour);
        foreach (SealCandidate one in quietestFirst)
        {
            if (unsealed <= target)
            {
                return;
            }

            if (chosen.Add(one))
            {
                unsealed -= one.Readings;
            }
        }
    }
}
