using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using LabWatch.Alerts.Messages;
using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Outbox;

/// <summary>Makes the messages that a step of an alert causes: one for each notifier.</summary>
internal static class MessageFactory
{
    /// <summary>The messages of a step.</summary>
    /// <param name="step">The step.</param>
    /// <param name="headline">What the message says in short.</param>
    /// <param name="detail">What it says at length.</param>
    /// <param name="notifiers">Whom to tell.</param>
    public static IReadOnlyList<OutboxMessage> For(AlertTransition step, string headline, string detail, IReadOnlyList<Notifier> notifiers) =>
        [.. notifiers.Select(notifier => For(step, headline, detail, notifier.Id))];

    /// <summary>Id of a message: the first 32 hexadecimal digits of SHA-256 over alert, step and notifier.</summary>
    public static string IdOf(Guid alert, int sequence, string notifier)
    {
        string text = string.Create(CultureInfo.InvariantCulture, $"{alert:D}\n{sequence}\n{notifier}");
        return Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)).AsSpan(0, 16));
    }

    /// <summary>The headline of the message about an acknowledgement.</summary>
    public static string Acknowledged(AlertTransition step) =>
        Phrase.Headline(AlertTexts.AcknowledgedHeadline, Phrase.Cut(step.By, 40), step.Alert.Headline);

    private static OutboxMessage For(AlertTransition step, string headline, string detail, string notifier)
    {
        Alert alert = step.Alert;
        string id = IdOf(alert.Id, step.Sequence, notifier);
        MessageBody body = new(
            id, alert.Id, step.Sequence, step.Event, step.At, alert.Source, alert.Code, alert.Subject, Word(alert.Priority.ToString()), Word(alert.State.ToString()), headline, detail,
            alert.IsHazard || detail.Contains(AlertTexts.Caution, StringComparison.Ordinal) ? AlertTexts.Caution : string.Empty, alert.RaisedAt, alert.ReturnedAt, alert.AcknowledgedAt, alert.AcknowledgedBy,
            alert.Value, alert.Limit, alert.Unit);
        string json = JsonSerializer.Serialize(body, MessageJson.Default.MessageBody);
        return new OutboxMessage(id, alert.Id, notifier, json, step.At, step.At, 0, null, null, null);
    }

    private static string Word(string name) => JsonNamingPolicy.KebabCaseLower.ConvertName(name);
}
