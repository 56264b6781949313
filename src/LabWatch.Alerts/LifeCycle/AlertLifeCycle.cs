using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.LifeCycle;

/// <summary>
/// The life of an alert in the words of IEC 62682 (ANSI/ISA-18.2), as pure functions from the last step to the next; null where nothing
/// changes. An alert is over only when its condition has returned <em>and</em> somebody has acknowledged it.
/// </summary>
internal static class AlertLifeCycle
{
    /// <summary>Who acts where nobody does.</summary>
    public const string Service = "labwatch";

    /// <summary>The next step for a condition that was found, given the last step of the open alert about the same key.</summary>
    public static AlertTransition? Next(AlertTransition? last, AlertCondition condition) =>
        condition.Present ? OnPresent(last, condition) : OnAbsent(last, condition.At, note: null);

    /// <summary>The next step for a condition that has gone.</summary>
    public static AlertTransition? OnAbsent(AlertTransition? last, Instant at, string? note)
    {
        if (last is null || last.Alert.State is AlertState.ReturnedUnacknowledged or AlertState.Normal)
        {
            return null;
        }

        AlertState next = last.Alert.State == AlertState.RaisedAcknowledged ? AlertState.Normal : AlertState.ReturnedUnacknowledged;
        return Step(last, last.Alert with { State = next, ReturnedAt = at }, at, AlertEvent.Returned, Service, note);
    }

    /// <summary>The next step for an acknowledgement. Acknowledging again changes nothing.</summary>
    public static AlertTransition? Acknowledge(AlertTransition last, Instant at, string by, string? note)
    {
        if (last.Alert.State is AlertState.RaisedAcknowledged or AlertState.Normal)
        {
            return null;
        }

        AlertState next = last.Alert.State == AlertState.RaisedUnacknowledged ? AlertState.RaisedAcknowledged : AlertState.Normal;
        Alert alert = last.Alert with { State = next, AcknowledgedAt = at, AcknowledgedBy = by, AcknowledgeNote = note };
        return Step(last, alert, at, AlertEvent.Acknowledged, by, note);
    }

    private static AlertTransition? OnPresent(AlertTransition? last, AlertCondition found)
    {
        if (last is null || last.Alert.State == AlertState.Normal)
        {
            Alert alert = new(
                Guid.CreateVersion7(found.At.ToDateTimeOffset()), found.Key.Source, found.Key.Code, found.Key.Subject, found.Priority,
                AlertState.RaisedUnacknowledged, found.At, found.Headline, found.Detail, found.Value, found.Limit, found.Unit);
            return new AlertTransition(alert, 1, found.At, AlertEvent.Raised, Service, null);
        }

        bool standing = last.Alert.State != AlertState.ReturnedUnacknowledged;
        return standing && found.Priority <= last.Alert.Priority ? null : RaiseAgain(last, found);
    }

    // A graver condition needs a new acknowledgement: the former one was given for something less.
    private static AlertTransition RaiseAgain(AlertTransition last, AlertCondition found)
    {
        Alert alert = last.Alert with
        {
            State = AlertState.RaisedUnacknowledged,
            Priority = found.Priority > last.Alert.Priority ? found.Priority : last.Alert.Priority,
            Headline = found.Headline,
            Detail = found.Detail,
            Value = found.Value,
            Limit = found.Limit,
            Unit = found.Unit,
            ReturnedAt = null,
            AcknowledgedAt = null,
            AcknowledgedBy = null,
            AcknowledgeNote = null,
        };
        return Step(last, alert, found.At, AlertEvent.RaisedAgain, Service, null);
    }

    private static AlertTransition Step(AlertTransition last, Alert alert, Instant at, string @event, string by, string? note) =>
        new(alert, last.Sequence + 1, at, @event, by, note);
}
