using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Assessments;

namespace LabWatch.Tests.Assessments;

/// <summary>A ledger with a hook before and after every call, where a test lets the process die or the database go away.</summary>
internal sealed class FaultyLedger(IAssessmentLedger ledger, IPositionLedger positions) : IAssessmentLedger, IPositionLedger
{
    public Action<string> At { get; set; } = _ => { };

    public async ValueTask RecordAsync(IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken)
    {
        At("before recording");
        await ledger.RecordAsync(assessments, cancellationToken);
        At("after recording");
    }

    public async ValueTask MoveWatermarkAsync(SourceKey source, string criterion, Instant windowEnd, CancellationToken cancellationToken)
    {
        At("before moving");
        await ledger.MoveWatermarkAsync(source, criterion, windowEnd, cancellationToken);
        At("after moving");
    }

    public ValueTask<Instant?> WatermarkAsync(SourceKey source, string criterion, CancellationToken cancellationToken)
    {
        At("watermark");
        return ledger.WatermarkAsync(source, criterion, cancellationToken);
    }

    public ValueTask<Assessment?> FindAsync(SourceKey source, string criterion, string scope, TimeWindow window, CancellationToken cancellationToken) =>
        ledger.FindAsync(source, criterion, scope, window, cancellationToken);

    public ValueTask<Assessment?> FindAsync(string id, CancellationToken cancellationToken) => ledger.FindAsync(id, cancellationToken);

    public ValueTask<IReadOnlyList<Assessment>> LatestAsync(CancellationToken cancellationToken) => ledger.LatestAsync(cancellationToken);

    public ValueTask<AssessmentPage> ListAsync(AssessmentQuery query, CancellationToken cancellationToken)
    {
        At("listing");
        return ledger.ListAsync(query, cancellationToken);
    }

    public ValueTask<IReadOnlyList<(long Sequence, Assessment Assessment)>> QueuedAsync(long afterSequence, int count, CancellationToken cancellationToken) =>
        ledger.QueuedAsync(afterSequence, count, cancellationToken);

    public ValueTask<long> PositionAsync(string reader, CancellationToken cancellationToken)
    {
        At("position");
        return positions.PositionAsync(reader, cancellationToken);
    }

    public async ValueTask SetPositionAsync(string reader, long position, CancellationToken cancellationToken)
    {
        At("before setting position");
        await positions.SetPositionAsync(reader, position, cancellationToken);
        At("after setting position");
    }
}
