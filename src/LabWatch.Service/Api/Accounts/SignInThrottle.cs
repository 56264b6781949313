using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;

namespace LabWatch.Service.Api.Accounts;

/// <summary>
/// Slows guessing on one account, whether it exists or not, so that the answer does not tell: five sign-ins may fail, then each next one
/// waits twice as long, up to 15 min, and after 100 in a row none is taken until the password is set anew (NIST SP 800-63B-4, 3.2.2, from
/// memory: at most 100 consecutive failures). An attempt counts as failed until it has succeeded, so that many at once gain nothing.
/// </summary>
internal sealed class SignInThrottle(SessionClock clock)
{
    /// <summary>Failures before the first wait.</summary>
    public const int Free = 5;

    /// <summary>Failures in a row at most.</summary>
    public const int Most = 100;

    /// <summary>Names that are kept in mind at most; the oldest that are no accounts go first.</summary>
    public const int MostNames = 10_000;

    /// <summary>Longest wait.</summary>
    public static readonly TimeSpan LongestWait = TimeSpan.FromMinutes(15);

    private readonly Lock _gate = new();
    private readonly Dictionary<string, Attempts> _names = new(StringComparer.Ordinal);

    /// <summary>Takes an attempt, and counts it as failed; or says how long to wait.</summary>
    /// <param name="name">The name given.</param>
    /// <param name="account">The account of that name; null where there is none.</param>
    /// <returns>Null where the attempt may be made.</returns>
    public TimeSpan? TryEnter(string name, Account? account)
    {
        lock (_gate)
        {
            Attempts attempts = Of(name, account);
            TimeSpan wait = attempts.Failures >= Most ? LongestWait : WaitAfter(attempts.Failures) - clock.Clock.GetElapsedTime(attempts.Stamp);
            if (attempts.Failures > 0 && wait > TimeSpan.Zero)
            {
                return wait;
            }

            _names[name] = attempts with { Failures = attempts.Failures + 1, Stamp = clock.Clock.GetTimestamp() };
            return null;
        }
    }

    /// <summary>Takes an attempt back that was not made after all, or has succeeded.</summary>
    public void Forgive(string name, bool hasSucceeded)
    {
        lock (_gate)
        {
            if (_names.TryGetValue(name, out Attempts? attempts))
            {
                _names[name] = attempts with { Failures = hasSucceeded ? 0 : Math.Max(0, attempts.Failures - 1) };
            }
        }
    }

    /// <summary>Failures in a row on a name.</summary>
    public int FailuresOf(string name)
    {
        lock (_gate)
        {
            return _names.GetValueOrDefault(name)?.Failures ?? 0;
        }
    }

    /// <summary>The wait after a number of failures in a row.</summary>
    public static TimeSpan WaitAfter(int failures) => failures < Free
        ? TimeSpan.Zero
        : TimeSpan.FromSeconds(Math.Min(LongestWait.TotalSeconds, Math.Pow(2, Math.Min(failures - Free, 20))));

    // The first time since the start, an account has the failures that are on the record; a new password since then forgives all of them.
    private Attempts Of(string name, Account? account)
    {
        if (_names.TryGetValue(name, out Attempts? known) && (account is null || known.Revision == account.Revision))
        {
            return known;
        }

        bool isRevised = known is not null && known.Revision > 0 && account!.Failures == 0;
        int failures = isRevised ? 0 : Math.Max(known?.Failures ?? 0, account?.Failures ?? 0);
        Attempts fresh = new(failures, known?.Stamp ?? clock.Clock.GetTimestamp(), account?.Revision ?? 0);
        MakeRoom();
        _names[name] = fresh;
        return fresh;
    }

    private void MakeRoom()
    {
        if (_names.Count < MostNames)
        {
            return;
        }

        string[] oldest = [.. _names.OrderBy(entry => entry.Value.Revision > 0).ThenBy(entry => entry.Value.Stamp).Take(MostNames / 2).Select(entry => entry.Key)];
        foreach (string name in oldest)
        {
            _names.Remove(name);
        }
    }

    private sealed record Attempts(int Failures, long Stamp, int Revision);
}
