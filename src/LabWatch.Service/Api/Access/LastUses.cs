using System.Collections.Concurrent;
using System.Collections.Immutable;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Accounts;

namespace LabWatch.Service.Api.Access;

/// <summary>When sessions and tokens were last used: in memory at once, in the records every minute, so that a request never waits for a write.</summary>
internal sealed class LastUses(ISessionLedger ledger, SessionClock clock, ILogger<LastUses> logger) : BackgroundService
{
    private static readonly TimeSpan Pause = TimeSpan.FromMinutes(1);

    private readonly ConcurrentDictionary<Guid, Instant> _sessions = new();
    private readonly ConcurrentDictionary<Guid, Instant> _tokens = new();

    /// <summary>A session was used now.</summary>
    public void OfSession(Guid id, Instant now) => _sessions[id] = now;

    /// <summary>A token was used now.</summary>
    public void OfToken(Guid id, Instant now) => _tokens[id] = now;

    /// <summary>Last use of a session that the records may not know yet; null where none.</summary>
    public Instant? Find(Guid session) => _sessions.TryGetValue(session, out Instant used) ? used : null;

    /// <summary>Puts on the record what has been used since.</summary>
    public async Task KeepAsync(CancellationToken cancellationToken)
    {
        ImmutableDictionary<Guid, Instant> sessions = _sessions.ToImmutableDictionary();
        ImmutableDictionary<Guid, Instant> tokens = _tokens.ToImmutableDictionary();
        if (sessions.IsEmpty && tokens.IsEmpty)
        {
            return;
        }

        await ledger.UsedAsync(sessions, tokens, cancellationToken);
        foreach (KeyValuePair<Guid, Instant> kept in sessions)
        {
            _sessions.TryRemove(kept);
        }

        foreach (KeyValuePair<Guid, Instant> kept in tokens)
        {
            _tokens.TryRemove(kept);
        }
    }

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            await Task.Delay(Pause, clock.Clock, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            try
            {
                await KeepAsync(CancellationToken.None);
            }
            catch (RecordsUnavailableException failure)
            {
                AccessLog.UsesNotKept(logger, failure.Message);
            }
        }
    }
}
