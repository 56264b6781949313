using LabWatch.Alerts;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>Alerts in memory.</summary>
internal sealed class FakeAlerts(TimeProvider clock) : IAlertBoard, IAlertLedger
{
    private readonly Lock _gate = new();
    private readonly Dictionary<Guid, List<AlertTransition>> _steps = [];

    public Alert Raise(Alert alert) => Step(alert, "raised", "labwatch", null);

    public Alert Step(Alert alert, string what, string by, string? note)
    {
        lock (_gate)
        {
            if (!_steps.TryGetValue(alert.Id, out List<AlertTransition>? steps))
            {
                _steps[alert.Id] = steps = [];
            }

            steps.Add(new AlertTransition(alert, steps.Count + 1, Instant.Now(clock), what, by, note));
            return alert;
        }
    }

    public event EventHandler<AlertBoardChange>? Changed
    {
        add { }
        remove { }
    }

    public IReadOnlyList<Finding> Findings => [];

    public int WaitingForLedger { get; set; }

    public bool JournalFailing { get; set; }

    public AlertBoardView View() => new(0, Open());

    public IReadOnlyList<OutboxMessage> PendingMessages() => [];

    public IReadOnlyList<Alert> Open()
    {
        lock (_gate)
        {
            return [.. _steps.Values.Select(steps => steps[^1].Alert).Where(alert => alert.State != AlertState.Normal)];
        }
    }

    public ValueTask<AcknowledgeResult> ShelveAsync(Guid id, string by, TimeSpan? length, string? reason, CancellationToken cancellationToken)
    {
        Alert? alert = Open().FirstOrDefault(open => open.Id == id);
        return new(new AcknowledgeResult(
            alert is null ? null : Step(alert with { Shelf = new AlertShelf(by, Instant.Now(clock), length is { } time ? Instant.Now(clock) + time : null, reason!) }, "shelved", by, reason), []));
    }

    public ValueTask<AcknowledgeResult> UnshelveAsync(Guid id, string by, string? note, CancellationToken cancellationToken)
    {
        Alert? alert = Open().FirstOrDefault(open => open.Id == id);
        return new(new AcknowledgeResult(alert is null ? null : Step(alert with { Shelf = null }, "unshelved", by, note), []));
    }

    public ValueTask<AcknowledgeResult> AcknowledgeAsync(Guid id, string by, string? note, CancellationToken cancellationToken)
    {
        lock (_gate)
        {
            if (!_steps.TryGetValue(id, out List<AlertTransition>? steps))
            {
                return new(new AcknowledgeResult(null, []));
            }

            Alert alert = steps[^1].Alert;
            if (alert.AcknowledgedBy is null)
            {
                alert = alert with
                {
                    State = alert.ReturnedAt is null ? AlertState.RaisedAcknowledged : AlertState.Normal,
                    AcknowledgedAt = Instant.Now(clock),
                    AcknowledgedBy = by,
                    AcknowledgeNote = note,
                };
                Step(alert, "acknowledged", by, note);
            }

            return new(new AcknowledgeResult(alert, []));
        }
    }

    public ValueTask RecordAsync(AlertTransition transition, IReadOnlyList<OutboxMessage> messages, CancellationToken cancellationToken) => default;

    public ValueTask<IReadOnlyList<Alert>> OpenAsync(CancellationToken cancellationToken) => new(Open());

    public ValueTask<Alert?> FindAsync(Guid id, CancellationToken cancellationToken)
    {
        lock (_gate)
        {
            return new(_steps.TryGetValue(id, out List<AlertTransition>? steps) ? steps[^1].Alert : null);
        }
    }

    public ValueTask<AlertPage> ListAsync(AlertQuery query, CancellationToken cancellationToken)
    {
        lock (_gate)
        {
            int skip = query.After is null ? 0 : int.Parse(query.After, System.Globalization.CultureInfo.InvariantCulture);
            Alert[] all =
            [
                .. _steps.Values.Select(steps => steps[^1].Alert)
                    .Where(alert => (query.Source is null || alert.Source == query.Source) && (!query.OpenOnly || alert.State != AlertState.Normal))
                    .OrderByDescending(alert => alert.RaisedAt),
            ];
            string? next = skip + query.Count < all.Length ? (skip + query.Count).ToString(System.Globalization.CultureInfo.InvariantCulture) : null;
            return new(new AlertPage([.. all.Skip(skip).Take(query.Count)], next));
        }
    }

    public ValueTask<IReadOnlyList<AlertTransition>> TransitionsAsync(Guid id, CancellationToken cancellationToken)
    {
        lock (_gate)
        {
            return new(_steps.TryGetValue(id, out List<AlertTransition>? steps) ? [.. steps] : []);
        }
    }

    public ValueTask<IReadOnlyList<OutboxMessage>> DueAsync(Instant now, int count, CancellationToken cancellationToken) => new([]);

    public ValueTask<IReadOnlyList<OutboxMessage>> MessagesAsync(Guid alertId, CancellationToken cancellationToken) => new([]);

    public ValueTask SettleAsync(OutboxMessage message, CancellationToken cancellationToken) => default;

    public ValueTask<long> PositionAsync(string reader, CancellationToken cancellationToken) => new(0L);

    public ValueTask SetPositionAsync(string reader, long position, CancellationToken cancellationToken) => default;
}
