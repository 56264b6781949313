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

        bool isLatched = HazardCode.IsLatched(last.Alert.Code);
        bool isOver = last.Alert.State == AlertState.RaisedAcknowledged && last.Alert.Shelf is null && !isLatched;
        Alert alert = last.Alert with { State = isOver ? AlertState.Normal : AlertState.ReturnedUnacknowledged, ReturnedAt = at };
        return Step(last, isLatched ? NotAcknowledged(alert) : alert, at, AlertEvent.Returned, Service, note);
    }

    /// <summary>The next step where nobody is to be told of it for a while; null for a hazard, and where it is so already.</summary>
    public static AlertTransition? Shelve(AlertTransition last, AlertShelf shelf) =>
        last.Alert.IsHazard || last.Alert.State == AlertState.Normal || last.Alert.Shelf is not null
            ? null
            : Step(
                last, last.Alert with { Shelf = shelf }, shelf.At, shelf.IsOutOfService ? AlertEvent.OutOfService : AlertEvent.Shelved, shelf.By,
                shelf.Until is { } until ? $"Until {until}: {shelf.Reason}" : shelf.Reason);

    /// <summary>
    /// The next step where people are to be told again: what stands needs a new acknowledgement, what has gone and was acknowledged is over.
    /// </summary>
    public static AlertTransition? Unshelve(AlertTransition last, Instant at, string by, string? note)
    {
        if (last.Alert.Shelf is not { } shelf)
        {
            return null;
        }

        Alert alert = last.Alert with { Shelf = null };
        alert = alert.State == AlertState.ReturnedUnacknowledged
            ? alert.AcknowledgedAt is null ? alert : alert with { State = AlertState.Normal }
            : NotAcknowledged(alert) with { State = AlertState.RaisedUnacknowledged };
        return Step(last, alert, at, shelf.IsOutOfService ? AlertEvent.ReturnedToService : AlertEvent.Unshelved, by, note);
    }

    /// <summary>The step that says that people were told of it with others.</summary>
    public static AlertTransition Summarise(AlertTransition last, Instant at, string note) => Step(last, last.Alert, at, AlertEvent.Summarised, Service, note);

    private static Alert NotAcknowledged(Alert alert) => alert with { AcknowledgedAt = null, AcknowledgedBy = null, AcknowledgeNote = null };

    /// <summary>The next step for an acknowledgement. Acknowledging again changes nothing.</summary>
    public static AlertTransition? Acknowledge(AlertTransition last, Instant at, string by, string? note)
    {
        bool waitsForShelf = last.Alert.Shelf is not null && last.Alert.State == AlertState.ReturnedUnacknowledged;
        if (last.Alert.State is AlertState.RaisedAcknowledged or AlertState.Normal || waitsForShelf)
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
        bool isGraver = found.Priority > last.Alert.Priority;
        Alert alert = last.Alert with
        {
            State = AlertState.RaisedUnacknowledged,
            Shelf = isGraver ? null : last.Alert.Shelf,
            Priority = isGraver ? found.Priority : last.Alert.Priority,
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
