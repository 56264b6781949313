using LabWatch.Lab.Time;

namespace LabWatch.Records.Accounts;

/// <summary>Sessions of people and tokens of programs. Both are found by the SHA-256 of their secret, which is stored nowhere.</summary>
public interface ISessionLedger
{
    /// <summary>Starts a session, sets the account's refused sign-ins to none, and drops sessions that have expired.</summary>
    /// <param name="site">Id of the site.</param>
    /// <param name="session">The session.</param>
    /// <param name="digest">SHA-256 of its secret, small hexadecimal digits.</param>
    /// <param name="at">When, by the laboratory's clock.</param>
    /// <param name="replaces">Id of a session that this one goes on from, which ends; null where somebody signed in.</param>
    /// <param name="cancellationToken">Ends the call.</param>
    ValueTask StartAsync(string site, Session session, string digest, Instant at, Guid? replaces, CancellationToken cancellationToken);

    /// <summary>The session of a digest and its account; null where there is none.</summary>
    ValueTask<(Session Session, Account Account)?> FindAsync(string site, string digest, CancellationToken cancellationToken);

    /// <summary>The sessions of an account, newest first.</summary>
    ValueTask<IReadOnlyList<Session>> ListAsync(string site, string account, CancellationToken cancellationToken);

    /// <summary>Ends a session of an account; false where it has none of that id.</summary>
    ValueTask<bool> EndAsync(string site, string account, Guid id, Instant at, CancellationToken cancellationToken);

    /// <summary>Ends all sessions of some accounts, without entries in the trail: for the start of a demo.</summary>
    ValueTask EndAllAsync(string site, IReadOnlyList<string> accounts, CancellationToken cancellationToken);

    /// <summary>Notes that the password was entered again in a session.</summary>
    ValueTask ConfirmAsync(Guid id, Instant confirmedAt, CancellationToken cancellationToken);

    /// <summary>Makes a token.</summary>
    ValueTask AddTokenAsync(string site, ApiToken token, string digest, CancellationToken cancellationToken);

    /// <summary>The token of a digest and its account; null where there is none.</summary>
    ValueTask<(ApiToken Token, Account Account)?> FindTokenAsync(string site, string digest, CancellationToken cancellationToken);

    /// <summary>The tokens of an account, or of all of them where null; newest first.</summary>
    ValueTask<IReadOnlyList<ApiToken>> ListTokensAsync(string site, string? account, CancellationToken cancellationToken);

    /// <summary>Takes a token back; false where there is none of that id, or not of that account (where one is given).</summary>
    ValueTask<bool> RevokeTokenAsync(string site, string? account, Guid id, string by, Instant at, CancellationToken cancellationToken);

    /// <summary>Notes when sessions and tokens were last used.</summary>
    ValueTask UsedAsync(IReadOnlyDictionary<Guid, Instant> sessions, IReadOnlyDictionary<Guid, Instant> tokens, CancellationToken cancellationToken);
}
