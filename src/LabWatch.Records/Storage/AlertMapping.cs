using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using LabWatch.Records.Storage.Rows;

namespace LabWatch.Records.Storage;

/// <summary>Alert, transition and message to rows and back, without loss.</summary>
internal static class AlertMapping
{
    public static AlertRow ToNewRow(Alert alert, long number) => new()
    {
        Id = alert.Id,
        Number = number,
        Site = alert.Source.Site,
        Source = alert.Source.Source,
        Code = alert.Code,
        Subject = alert.Subject,
        RaisedAt = alert.RaisedAt.Microseconds,
        Priority = StoredNames.Of(alert.Priority),
        State = StoredNames.Of(alert.State),
        Headline = alert.Headline,
        Detail = alert.Detail,
        Unit = alert.Unit,
    };

    /// <summary>Copies what changes in the life of an alert.</summary>
    public static void CopyState(Alert alert, AlertStateColumns row)
    {
        row.Priority = StoredNames.Of(alert.Priority);
        row.State = StoredNames.Of(alert.State);
        row.Headline = alert.Headline;
        row.Detail = alert.Detail;
        row.Value = Number(alert.Value);
        row.LimitValue = Number(alert.Limit);
        row.Unit = alert.Unit;
        row.ReturnedAt = alert.ReturnedAt?.Microseconds;
        row.AcknowledgedAt = alert.AcknowledgedAt?.Microseconds;
        row.AcknowledgedBy = alert.AcknowledgedBy;
        row.AcknowledgeNote = alert.AcknowledgeNote;
    }

    public static AlertTransitionRow ToRow(AlertTransition transition)
    {
        Alert alert = transition.Alert;
        AlertTransitionRow row = new()
        {
            AlertId = alert.Id,
            Sequence = transition.Sequence,
            Site = alert.Source.Site,
            At = transition.At.Microseconds,
            Event = transition.Event,
            By = transition.By,
            Note = transition.Note,
            Priority = StoredNames.Of(alert.Priority),
            State = StoredNames.Of(alert.State),
            Headline = alert.Headline,
            Detail = alert.Detail,
            Unit = alert.Unit,
        };
        CopyState(alert, row);
        return row;
    }

    public static Alert ToAlert(AlertRow row) => ToAlert(row, row);

    public static AlertTransition ToTransition(AlertRow alert, AlertTransitionRow row) =>
        new(ToAlert(alert, row), row.Sequence, new Instant(row.At), row.Event, row.By, row.Note);

    public static OutboxRow ToRow(OutboxMessage message, string site) => new()
    {
        Id = message.Id,
        Site = site,
        AlertId = message.AlertId,
        Notifier = message.Notifier,
        Body = message.Body,
        QueuedAt = message.QueuedAt.Microseconds,
        DueAt = message.DueAt.Microseconds,
        Attempts = message.Attempts,
        SentAt = message.SentAt?.Microseconds,
        GivenUpAt = message.GivenUpAt?.Microseconds,
        LastError = message.LastError,
    };

    public static OutboxMessage ToMessage(OutboxRow row) => new(
        row.Id,
        row.AlertId,
        row.Notifier,
        row.Body,
        new Instant(row.QueuedAt),
        new Instant(row.DueAt),
        row.Attempts,
        Time(row.SentAt),
        Time(row.GivenUpAt),
        row.LastError);

    private static Alert ToAlert(AlertRow fixedPart, AlertStateColumns state) => new(
        fixedPart.Id,
        new SourceKey(fixedPart.Site, fixedPart.Source),
        fixedPart.Code,
        fixedPart.Subject,
        StoredNames.ReadPriority(state.Priority),
        StoredNames.ReadAlertState(state.State),
        new Instant(fixedPart.RaisedAt),
        state.Headline,
        state.Detail,
        state.Value,
        state.LimitValue,
        state.Unit)
    {
        ReturnedAt = Time(state.ReturnedAt),
        AcknowledgedAt = Time(state.AcknowledgedAt),
        AcknowledgedBy = state.AcknowledgedBy,
        AcknowledgeNote = state.AcknowledgeNote,
    };

    private static Instant? Time(long? microseconds) => microseconds is { } value ? new Instant(value) : null;

    private static double? Number(double? value) => value is { } number ? StoredDocuments.NotANumberToNull(number) : null;
}
