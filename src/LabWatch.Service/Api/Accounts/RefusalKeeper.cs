using System.Collections.Immutable;
using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;

namespace LabWatch.Service.Api.Accounts;

/// <summary>
/// Puts refused sign-ins on the record, so that an attack is seen and cannot fill the trail: the first on an account within seconds, those
/// that follow summed up, one entry an account in ten minutes, and one for all names that are no accounts.
/// </summary>
internal sealed class RefusalKeeper(
    IAccountLedger ledger, SignInThrottle throttle, ILabSnapshotSource lab, TimeProvider labClock, SessionClock clock, ILogger<RefusalKeeper> logger) : BackgroundService
{
    private const int MostAddresses = 5;
    private static readonly TimeSpan Pause = TimeSpan.FromSeconds(5);
    private static readonly TimeSpan BetweenEntries = TimeSpan.FromMinutes(10);

    // All names that are no accounts share one entry under the empty name.
    private const string NoAccount = "";

    private readonly Lock _gate = new();
    private readonly Dictionary<string, Pending> _pending = new(StringComparer.Ordinal);

    /// <summary>A sign-in was refused.</summary>
    /// <param name="account">Name of the account; null where there is none.</param>
    /// <param name="address">Where it came from.</param>
    public void Refused(string? account, string address)
    {
        Instant now = Instant.Now(labClock);
        lock (_gate)
        {
            string key = account ?? NoAccount;
            Pending pending = _pending.GetValueOrDefault(key) ?? new Pending(0, now, now, [], null);
            _pending[key] = pending with
            {
                Count = pending.Count + 1,
                From = pending.Count == 0 ? now : pending.From,
                To = now,
                Addresses = pending.Addresses.Count < MostAddresses ? pending.Addresses.Add(address) : pending.Addresses,
            };
        }
    }

    /// <summary>Puts on the record what is due; all of it where the service ends.</summary>
    public async Task KeepAsync(bool isAll, CancellationToken cancellationToken)
    {
        List<SignInRefusals> due = TakeDue(isAll);
        if (due.Count == 0)
        {
            return;
        }

        try
        {
            await ledger.RefusedAsync(lab.Current.Site.Id, due, Instant.Now(labClock), cancellationToken);
            foreach (SignInRefusals refused in due)
            {
                AccessLog.Refused(logger, refused.Account ?? "names that are no accounts", refused.Count);
            }
        }
        catch (RecordsUnavailableException failure)
        {
            GiveBack(due);
            AccessLog.RefusalsNotKept(logger, failure.Message);
        }
    }

    public override async Task StopAsync(CancellationToken cancellationToken)
    {
        await base.StopAsync(cancellationToken);
        await KeepAsync(isAll: true, cancellationToken);
    }

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            await Task.Delay(Pause, clock.Clock, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            if (!stoppingToken.IsCancellationRequested)
            {
                await KeepAsync(isAll: false, CancellationToken.None);
            }
        }
    }

    private List<SignInRefusals> TakeDue(bool isAll)
    {
        long now = clock.Clock.GetTimestamp();
        List<SignInRefusals> due = [];
        lock (_gate)
        {
            foreach ((string name, Pending pending) in _pending.ToList())
            {
                bool isQuiet = pending.LastEntry is null || clock.Clock.GetElapsedTime(pending.LastEntry.Value, now) >= BetweenEntries;
                if (pending.Count > 0 && (isQuiet || isAll))
                {
                    due.Add(new SignInRefusals(
                        name == NoAccount ? null : name, pending.Count, pending.From, pending.To, [.. pending.Addresses.Order(StringComparer.Ordinal)], throttle.FailuresOf(name)));
                    _pending[name] = pending with { Count = 0, Addresses = [], LastEntry = now };
                }
                else if (pending.Count == 0 && isQuiet)
                {
                    _pending.Remove(name);
                }
            }
        }

        return due;
    }

    private void GiveBack(List<SignInRefusals> refusals)
    {
        lock (_gate)
        {
            foreach (SignInRefusals refused in refusals)
            {
                string key = refused.Account ?? NoAccount;
                Pending pending = _pending.GetValueOrDefault(key) ?? new Pending(0, refused.From, refused.To, [], null);
                _pending[key] = pending with
                {
                    Count = pending.Count + refused.Count,
                    From = refused.From,
                    Addresses = [.. pending.Addresses.Concat(refused.Addresses).Distinct(StringComparer.Ordinal).Take(MostAddresses)],
                    LastEntry = null,
                };
            }
        }
    }

    private sealed record Pending(int Count, Instant From, Instant To, ImmutableHashSet<string> Addresses, long? LastEntry);
}
