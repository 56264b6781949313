using LabWatch.Lab.Time;

namespace LabWatch.Records.Accounts;

/// <summary>The accounts of a site. Every change is a new revision, with its entry in the audit trail in the same transaction.</summary>
public interface IAccountLedger
{
    /// <summary>Whether the site has any account.</summary>
    ValueTask<bool> AnyAsync(string site, CancellationToken cancellationToken);

    /// <summary>The account of a name; null where there is none.</summary>
    ValueTask<Account?> FindAsync(string site, string name, CancellationToken cancellationToken);

    /// <summary>All accounts, by name.</summary>
    ValueTask<IReadOnlyList<Account>> ListAsync(string site, CancellationToken cancellationToken);

    /// <summary>Adds an account. Its revision, times and failures are not looked at.</summary>
    /// <param name="site">Id of the site.</param>
    /// <param name="account">The account.</param>
    /// <param name="by">Who adds it.</param>
    /// <param name="at">When.</param>
    /// <param name="isFirst">Whether it may be added as the site's very first only: the end of the set-up.</param>
    /// <param name="cancellationToken">Ends the call.</param>
    ValueTask<AccountOutcome> AddAsync(string site, Account account, string by, Instant at, bool isFirst, CancellationToken cancellationToken);

    /// <summary>
    /// Changes an account. A new password and a closed account end its sessions; the latter keeps its tokens from being taken too, for as long as it is closed.
    /// </summary>
    ValueTask<AccountOutcome> ChangeAsync(string site, string name, AccountChange change, string by, Instant at, CancellationToken cancellationToken);

    /// <summary>Puts refused sign-ins on the record: the count of each account, and one entry each in the trail.</summary>
    ValueTask RefusedAsync(string site, IReadOnlyList<SignInRefusals> refusals, Instant at, CancellationToken cancellationToken);
}
