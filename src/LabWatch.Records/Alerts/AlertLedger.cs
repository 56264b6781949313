using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Alerts;

/// <summary>The alerts in the records database.</summary>
internal sealed class AlertLedger(RecordsDatabase database, IPositionLedger positions) : IAlertLedger
{
    public async ValueTask RecordAsync(AlertTransition transition, IReadOnlyList<OutboxMessage> messages, CancellationToken cancellationToken) =>
        await database.WriteAsync(context => AlertWriting.AddAsync(context, transition, messages, cancellationToken), cancellationToken);

    public async ValueTask<IReadOnlyList<Alert>> OpenAsync(CancellationToken cancellationToken)
    {
        List<AlertRow> rows = await database.ReadAsync(
            context => context.Alerts.Where(row => row.State != StoredNames.Normal)
                .OrderByDescending(row => row.RaisedAt).ThenByDescending(row => row.Number)
                .ToListAsync(cancellationToken),
            cancellationToken);
        return rows.ConvertAll(AlertMapping.ToAlert);
    }

    public async ValueTask<Alert?> FindAsync(Guid id, CancellationToken cancellationToken)
    {
        AlertRow? row = await database.ReadAsync(
            context => context.Alerts.FirstOrDefaultAsync(candidate => candidate.Id == id, cancellationToken), cancellationToken);
        return row is null ? null : AlertMapping.ToAlert(row);
    }

    public async ValueTask<AlertPage> ListAsync(AlertQuery query, CancellationToken cancellationToken)
    {
        PageCursor? after = PageCursor.Of(query.After);
        List<AlertRow> rows = await database.ReadAsync(
            context => Matching(context, query, after).Take(query.Count + 1).ToListAsync(cancellationToken), cancellationToken);
        AlertRow? last = rows.Count > query.Count ? rows[query.Count - 1] : null;
        return new AlertPage(
            [.. rows.Take(query.Count).Select(AlertMapping.ToAlert)],
            last is null ? null : new PageCursor(last.RaisedAt, last.Number).ToString());
    }

    public async ValueTask<IReadOnlyList<AlertTransition>> TransitionsAsync(Guid id, CancellationToken cancellationToken)
    {
        (AlertRow? alert, List<AlertTransitionRow> steps) = await database.ReadAsync(
            async context => (
                await context.Alerts.FirstOrDefaultAsync(row => row.Id == id, cancellationToken),
                await context.AlertTransitions.Where(row => row.AlertId == id).OrderBy(row => row.Sequence).ToListAsync(cancellationToken)),
            cancellationToken);
        return alert is null ? [] : steps.ConvertAll(step => AlertMapping.ToTransition(alert, step));
    }

    public async ValueTask<IReadOnlyList<OutboxMessage>> DueAsync(Instant now, int count, CancellationToken cancellationToken)
    {
        List<OutboxRow> rows = await database.ReadAsync(
            context => context.Outbox
                .Where(row => row.SentAt == null && row.GivenUpAt == null && row.DueAt <= now.Microseconds)
                .OrderBy(row => row.DueAt).ThenBy(row => row.QueuedAt).ThenBy(row => row.Id)
                .Take(count)
                .ToListAsync(cancellationToken),
            cancellationToken);
        return rows.ConvertAll(AlertMapping.ToMessage);
    }

    public async ValueTask<IReadOnlyList<OutboxMessage>> MessagesAsync(Guid alertId, CancellationToken cancellationToken)
    {
        List<OutboxRow> rows = await database.ReadAsync(
            context => context.Outbox.Where(row => row.AlertId == alertId).OrderBy(row => row.QueuedAt).ThenBy(row => row.Id).ToListAsync(cancellationToken),
            cancellationToken);
        return rows.ConvertAll(AlertMapping.ToMessage);
    }

    public async ValueTask SettleAsync(OutboxMessage message, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            context => context.Outbox.Where(row => row.Id == message.Id).ExecuteUpdateAsync(
                row => row
                    .SetProperty(target => target.DueAt, message.DueAt.Microseconds)
                    .SetProperty(target => target.Attempts, message.Attempts)
                    .SetProperty(target => target.SentAt, MicrosecondsOf(message.SentAt))
                    .SetProperty(target => target.GivenUpAt, MicrosecondsOf(message.GivenUpAt))
                    .SetProperty(target => target.LastError, message.LastError),
                cancellationToken),
            cancellationToken);

    public ValueTask<long> PositionAsync(string reader, CancellationToken cancellationToken) => positions.PositionAsync(reader, cancellationToken);

    public ValueTask SetPositionAsync(string reader, long position, CancellationToken cancellationToken) =>
        positions.SetPositionAsync(reader, position, cancellationToken);

    private static long? MicrosecondsOf(Instant? instant) => instant?.Microseconds;

    private static IQueryable<AlertRow> Matching(RecordsContext context, AlertQuery query, PageCursor? after)
    {
        IQueryable<AlertRow> rows = context.Alerts;
        if (query.Source is { } source)
        {
            rows = rows.Where(row => row.Site == source.Site && row.Source == source.Source);
        }

        if (query.OpenOnly)
        {
            rows = rows.Where(row => row.State != StoredNames.Normal);
        }

        if (after is { } cursor)
        {
            rows = rows.Where(row => row.RaisedAt < cursor.Time || (row.RaisedAt == cursor.Time && row.Number < cursor.Number));
        }

        return rows.OrderByDescending(row => row.RaisedAt).ThenByDescending(row => row.Number);
    }
}
