using System.Text.Json;
using LabWatch.Alerts.Messages;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Outbox;

/// <inheritdoc cref="ITestMessages"/>
internal sealed class TestMessages(MessageSender sender, NotifierBook notifiers, ILabSnapshotSource lab, TimeProvider clock) : ITestMessages
{
    /// <inheritdoc/>
    public IReadOnlyList<Notifier> Notifiers => notifiers.Current;

    /// <inheritdoc/>
    public async ValueTask<TestOutcome?> SendAsync(string notifier, string by, CancellationToken cancellationToken)
    {
        if (notifiers.Find(notifier) is null)
        {
            return null;
        }

        Instant now = Instant.Now(clock);
        Guid id = Guid.CreateVersion7(now.ToDateTimeOffset());
        LabSite site = lab.Current.Site;
        MessageBody body = new(
            MessageFactory.IdOf(id, 1, notifier), id, 1, "test", now, new SourceKey(site.Id, "labwatch"), string.Empty, string.Empty, "low", "normal",
            Phrase.Headline(AlertTexts.TestHeadline, Phrase.Cut(site.Name, 40), Phrase.Cut(by, 40)), Phrase.Fill(AlertTexts.TestDetail, site.Name, by, new SiteTime(site).Write(now)),
            string.Empty, now, null, null, null, null, null, string.Empty);
        OutboxMessage message = new(body.Message, id, notifier, JsonSerializer.Serialize(body, MessageJson.Default.MessageBody), now, now, 0, null, null, null);
        SendOutcome outcome = await sender.AttemptOnceAsync(message, cancellationToken);
        return new TestOutcome(outcome.Result == SendResult.Sent, outcome.Error);
    }
}
