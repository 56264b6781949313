namespace LabWatch.Alerts.Outbox;

/// <summary>
/// Spares a receiver that does not answer: after some failures in a row nothing is tried for a while, then one attempt alone tests whether it is back.
/// Thread-safe. Nothing is lost by it: what waits stays in the journal.
/// </summary>
internal sealed class CircuitBreaker(TimeProvider clock, TimeSpan rest)
{
    private const int FailuresToOpen = 5;

    private readonly Lock _gate = new();
    private int _failures;
    private long _openedAt;
    private bool _isTesting;

    /// <summary>Whether nothing is tried at present.</summary>
    public bool IsOpen
    {
        get
        {
            lock (_gate)
            {
                return _failures >= FailuresToOpen;
            }
        }
    }

    /// <summary>How long to wait before asking again whether to try; zero where an attempt may be made now.</summary>
    public TimeSpan Ask()
    {
        lock (_gate)
        {
            if (_failures < FailuresToOpen)
            {
                return TimeSpan.Zero;
            }

            TimeSpan left = rest - clock.GetElapsedTime(_openedAt);
            if (left <= TimeSpan.Zero && !_isTesting)
            {
                _isTesting = true;
                return TimeSpan.Zero;
            }

            return left > TimeSpan.Zero ? left : rest;
        }
    }

    /// <summary>Notes how an attempt ended: whether the receiver answered at all as one that works.</summary>
    public void Note(bool answered)
    {
        lock (_gate)
        {
            _isTesting = false;
            _failures = answered ? 0 : Math.Min(_failures + 1, FailuresToOpen);
            _openedAt = clock.GetTimestamp();
        }
    }
}
