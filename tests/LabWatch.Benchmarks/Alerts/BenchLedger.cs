using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;

namespace LabWatch.Benchmarks.Alerts;

/// <summary>Ledgers that answer at once with nothing, fail, or hang.</summary>
internal sealed class BenchLedger(LedgerBehaviour behaviour) : IAlertLedger, IAssessmentLedger
{
    public async ValueTask RecordAsync(AlertTransition transition, IReadOnlyList<OutboxMessage> messages, CancellationToken cancellationToken) => await AnswerAsync(cancellationToken);

    public async ValueTask<IReadOnlyList<Alert>> OpenAsync(CancellationToken cancellationToken) => await WithAsync<IReadOnlyList<Alert>>([], cancellationToken);

    public async ValueTask<Alert?> FindAsync(Guid id, CancellationToken cancellationToken) => await WithAsync<Alert?>(null, cancellationToken);

    public async ValueTask<AlertPage> ListAsync(AlertQuery query, CancellationToken cancellationToken) => await WithAsync(new AlertPage([], null), cancellationToken);

    public async ValueTask<IReadOnlyList<AlertTransition>> TransitionsAsync(Guid id, CancellationToken cancellationToken) =>
        await WithAsync<IReadOnlyList<AlertTransition>>([], cancellationToken);

    public async ValueTask<IReadOnlyList<OutboxMessage>> DueAsync(Instant now, int count, CancellationToken cancellationToken) =>
        await WithAsync<IReadOnlyList<OutboxMessage>>([], cancellationToken);

    public async ValueTask<IReadOnlyList<OutboxMessage>> MessagesAsync(Guid alertId, CancellationToken cancellationToken) =>
        await WithAsync<IReadOnlyList<OutboxMessage>>([], cancellationToken);

    public async ValueTask SettleAsync(OutboxMessage message, CancellationToken cancellationToken) => await AnswerAsync(cancellationToken);

    public async ValueTask<long> PositionAsync(string reader, CancellationToken cancellationToken) => await WithAsync(0L, cancellationToken);

    public async ValueTask SetPositionAsync(string reader, long position, CancellationToken cancellationToken) => await AnswerAsync(cancellationToken);

    public async ValueTask<IReadOnlyList<(long Sequence, Assessment Assessment)>> QueuedAsync(long afterSequence, int count, CancellationToken cancellationToken) =>
        await WithAsync<IReadOnlyList<(long, Assessment)>>([], cancellationToken);

    public ValueTask RecordAsync(Assessment assessment, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask RecordAsync(IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask MoveWatermarkAsync(SourceKey source, string criterion, Instant end, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<Instant?> WatermarkAsync(SourceKey source, string criterion, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<Assessment?> FindAsync(SourceKey source, string criterion, string scope, TimeWindow window, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<Assessment?> FindAsync(string id, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<IReadOnlyList<Assessment>> LatestAsync(CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<AssessmentPage> ListAsync(AssessmentQuery query, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<IReadOnlyList<Assessment>> OverlappingAsync(SourceKey source, TimeWindow span, CancellationToken cancellationToken) => throw new NotSupportedException();

    private async Task<T> WithAsync<T>(T answer, CancellationToken cancellationToken)
    {
        await AnswerAsync(cancellationToken);
        return answer;
    }

    private async Task AnswerAsync(CancellationToken cancellationToken)
    {
        if (behaviour == LedgerBehaviour.Hangs)
        {
            await Task.Delay(Timeout.InfiniteTimeSpan, TimeProvider.System, cancellationToken);
        }

        if (behaviour == LedgerBehaviour.Fails)
        {
            throw new IOException("The records database does not answer.");
        }
    }
}
