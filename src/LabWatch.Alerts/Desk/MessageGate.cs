using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Desk;

/// <summary>
/// Decides which steps are told at once and which wait for the next summary, so that one cause with its followers makes one message and a flood one a
/// minute. The first message of each hazard and source goes at once, always; so does what is graver than everything told lately. Used
/// by the desk alone.
/// </summary>
/// <param name="window">What follows within this time on the same thing at the same source is a follower.</param>
internal sealed class MessageGate(TimeSpan window)
{
    /// <summary>Steps in a minute from which on people are told by summary: more than ten alarms in ten minutes are a flood for one person (ISA-18.2; EEMUA 191; from memory), and a minute of that is over in any case.</summary>
    private const int Flood = 10;

    /// <summary>Times that one alert is told within the time before it chatters: three or more a minute (ISA-18.2, from memory).</summary>
    private const int Chattering = 3;

    private readonly Dictionary<(SourceKey Source, string Code), (Instant At, Guid Alert, int Times)> _told = [];
    private readonly Queue<(Instant At, AlertPriority Priority)> _lately = new();
    private Instant _floodUntil = Instant.MinValue;

    /// <summary>Learns how many conditions come at once.</summary>
    public void Expect(int conditions, Instant now)
    {
        if (window > TimeSpan.Zero && conditions > Flood)
        {
            _floodUntil = now + window;
        }
    }

    /// <summary>Whether a step is told at once.</summary>
    /// <param name="step">The step.</param>
    /// <param name="isHeld">Whether an earlier step of the same alert waits for the summary.</param>
    public bool MayTell(AlertTransition step, bool isHeld)
    {
        if (window <= TimeSpan.Zero)
        {
            return true;
        }

        while (_lately.TryPeek(out (Instant At, AlertPriority Priority) oldest) && step.At - oldest.At >= window)
        {
            _lately.Dequeue();
        }

        bool tells = Decide(step, isHeld);
        if (tells)
        {
            _lately.Enqueue((step.At, step.Alert.Priority));
        }

        return tells;
    }

    private bool Decide(AlertTransition step, bool isHeld)
    {
        bool isFlood = _lately.Count >= Flood || step.At < _floodUntil;
        if (step.Event is not (LifeCycle.AlertEvent.Raised or LifeCycle.AlertEvent.RaisedAgain))
        {
            return !isHeld && !isFlood;
        }

        (SourceKey, string) key = (step.Alert.Source, step.Alert.Code);
        bool isRecent = _told.TryGetValue(key, out (Instant At, Guid Alert, int Times) told) && step.At - told.At < window;
        bool isSame = isRecent && told.Alert == step.Alert.Id;
        bool isFollower = isRecent && !(isSame && told.Times < Chattering);
        bool isGraver = _lately.Count > 0 && step.Alert.Priority > _lately.Max(one => one.Priority);
        bool tells = !isFollower && (step.Alert.IsHazard || !isFlood || isGraver);
        if (tells)
        {
            _told[key] = isSame ? told with { Times = told.Times + 1 } : (step.At, step.Alert.Id, 1);
        }

        return tells;
    }
}
