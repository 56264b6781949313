using System.Text.Json.Nodes;
using LabWatch.Lab.Alerts;
using LabWatch.Records.Audit;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Alerts;

/// <summary>What belongs to one step in the life of an alert, inside the caller's transaction.</summary>
internal static class AlertWriting
{
    /// <summary>
    /// Adds the step and its messages and brings the alert to its new state. A step that is there already changes nothing, and one that
    /// arrives after a later one does not turn the alert back. Whether the step was new.
    /// </summary>
    public static async Task<bool> AddAsync(
        RecordsContext context, AlertTransition transition, IReadOnlyList<OutboxMessage> messages, CancellationToken cancellationToken)
    {
        Alert alert = transition.Alert;
        bool known = await context.AlertTransitions
            .AnyAsync(row => row.AlertId == alert.Id && row.Sequence == transition.Sequence, cancellationToken);
        if (known)
        {
            return false;
        }

        AlertTransitionRow step = AlertMapping.ToRow(transition);
        context.AlertTransitions.Add(step);
        AlertRow? row = await context.Alerts.FindAsync([alert.Id], cancellationToken);
        if (row is null)
        {
            row = AlertMapping.ToNewRow(alert, await NextNumberAsync(context, cancellationToken));
            context.Alerts.Add(row);
            await AuditChain.CoverAsync(context, row, NoteOf(transition, AuditActions.AlertOpened), cancellationToken);
        }

        await AuditChain.CoverAsync(context, step, NoteOf(transition, AuditActions.AlertStep), cancellationToken);

        if (transition.Sequence > row.Transition)
        {
            AlertMapping.CopyState(alert, row);
            row.Transition = transition.Sequence;
        }

        await QueueAsync(context, alert.Source.Site, messages, cancellationToken);
        return true;
    }

    private static AuditNote NoteOf(AlertTransition transition, string action)
    {
        Alert alert = transition.Alert;
        return new AuditNote(
            alert.Source.Site,
            transition.At,
            transition.By,
            action,
            string.Empty,
            new JsonObject
            {
                ["source"] = alert.Source.Source,
                ["code"] = alert.Code,
                ["subject"] = alert.Subject,
                ["event"] = transition.Event,
                ["priority"] = StoredNames.Of(alert.Priority),
                ["state"] = StoredNames.Of(alert.State),
            },
            null);
    }

    private static async Task<long> NextNumberAsync(RecordsContext context, CancellationToken cancellationToken) =>
        (await context.Alerts.MaxAsync(row => (long?)row.Number, cancellationToken) ?? 0) + 1;

    private static async Task QueueAsync(
        RecordsContext context, string site, IReadOnlyList<OutboxMessage> messages, CancellationToken cancellationToken)
    {
        string[] ids = [.. messages.Select(message => message.Id)];
        HashSet<string> queued = [.. await context.Outbox.Where(row => ids.Contains(row.Id)).Select(row => row.Id).ToListAsync(cancellationToken)];
        context.Outbox.AddRange(messages.Where(message => queued.Add(message.Id)).Select(message => AlertMapping.ToRow(message, site)));
    }
}
