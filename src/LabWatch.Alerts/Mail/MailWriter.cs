using LabWatch.Alerts.Links;
using LabWatch.Alerts.Messages;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using MimeKit;
using MimeKit.Utils;

namespace LabWatch.Alerts.Mail;

/// <summary>Puts a message into an e-mail: plain text, the headline as its subject, one thread an alert.</summary>
internal sealed class MailWriter(AlertLinks links, AlertsOptions options)
{
    /// <summary>
    /// The e-mail. Its Message-ID is the message's own, the same on every attempt, so that a mailbox can tell a message that came twice; all
    /// mails about one alert refer to the alert.
    /// </summary>
    public MimeMessage Write(Notifier notifier, MessageBody body, Instant now)
    {
        MailboxAddress from = MailboxAddress.Parse(options.MailFrom!);
        MimeMessage mail = new();
        mail.From.Add(from);
        mail.To.Add(MailboxAddress.Parse(AddressOf(notifier)));
        mail.Subject = $"[LabWatch] {body.Headline}";
        mail.Date = now.ToDateTimeOffset();
        mail.MessageId = $"{body.Message}@{from.Domain}";
        mail.References.Add(MimeUtils.ParseMessageId($"{body.Alert:N}@{from.Domain}")!);
        mail.Headers.Add("Auto-Submitted", "auto-generated");
        mail.Priority = body.Priority == "high" ? MessagePriority.Urgent : MessagePriority.Normal;
        mail.Body = new TextPart("plain") { Text = TextOf(body, now) };
        return mail;
    }

    /// <summary>The mailbox of a notifier.</summary>
    public static string AddressOf(Notifier notifier) => Uri.UnescapeDataString(notifier.Address!.AbsoluteUri["mailto:".Length..]);

    private string TextOf(MessageBody body, Instant now)
    {
        string text = body.Detail + "\n";
        if (body.Code.Length == 0)
        {
            return text;
        }

        bool mayAcknowledge = body.State is "raised-unacknowledged" or "returned-unacknowledged";
        return links.For(body.Alert, now) is { } link
            ? text + "\n" + Phrase.Fill(mayAcknowledge ? AlertTexts.MailAcknowledge : AlertTexts.MailLook, link) + "\n"
            : text;
    }
}
