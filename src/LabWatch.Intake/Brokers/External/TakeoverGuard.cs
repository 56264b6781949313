namespace LabWatch.Intake.Brokers.External;

/// <summary>
/// Notices that another client uses our session, and makes this one leave it alone for a while instead of fighting for it. MQTT 5 brokers
/// say so; with others a series of connections that each end within seconds is the sign.
/// </summary>
internal sealed class TakeoverGuard(TimeSpan pause, TimeProvider clock)
{
    private const int Series = 5;
    private int _shortLives;
    private long? _since;

    /// <summary>A connection that ended sooner than this counts as short.</summary>
    public static TimeSpan ShortLife { get; } = TimeSpan.FromSeconds(10);

    /// <summary>Whether the session is being left alone.</summary>
    public bool Pausing => Remaining > TimeSpan.Zero;

    /// <summary>How long it is still left alone; zero where it is not.</summary>
    public TimeSpan Remaining
    {
        get
        {
            TimeSpan left = _since is { } since ? pause - clock.GetElapsedTime(since) : TimeSpan.Zero;
            return left > TimeSpan.Zero ? left : TimeSpan.Zero;
        }
    }

    /// <summary>Notes how a connection ended; true where a pause begins.</summary>
    public bool Note(LinkEnd end, bool durable, TimeSpan lived)
    {
        bool ended = end is LinkEnd.Lost or LinkEnd.TakenOver;
        _shortLives = !durable ? _shortLives : ended && lived < ShortLife ? _shortLives + 1 : 0;
        if (durable && (end == LinkEnd.TakenOver || _shortLives >= Series))
        {
            _shortLives = 0;
            _since = clock.GetTimestamp();
            return true;
        }

        return false;
    }
}
