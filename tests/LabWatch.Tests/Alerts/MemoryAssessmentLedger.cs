using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Assessments;

namespace LabWatch.Tests.Alerts;

/// <summary>The queue of assessments in memory; the alerts use nothing else of the ledger.</summary>
internal sealed class MemoryAssessmentLedger : IAssessmentLedger
{
    private readonly Lock _gate = new();
    private readonly List<Assessment> _queue = [];

    public void Add(params Assessment[] assessments)
    {
        lock (_gate)
        {
            _queue.AddRange(assessments);
        }
    }

    public ValueTask<IReadOnlyList<(long Sequence, Assessment Assessment)>> QueuedAsync(long afterSequence, int count, CancellationToken cancellationToken)
    {
        lock (_gate)
        {
            return ValueTask.FromResult<IReadOnlyList<(long, Assessment)>>(
                [.. _queue.Select((assessment, index) => (index + 1L, assessment)).Where(item => item.Item1 > afterSequence).Take(count)]);
        }
    }

    public ValueTask RecordAsync(Assessment assessment, CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask RecordAsync(IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask MoveWatermarkAsync(SourceKey source, string criterion, Instant end, CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask<Instant?> WatermarkAsync(SourceKey source, string criterion, CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask<Assessment?> FindAsync(SourceKey source, string criterion, string scope, TimeWindow window, CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask<Assessment?> FindAsync(string id, CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask<IReadOnlyList<Assessment>> LatestAsync(CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask<AssessmentPage> ListAsync(AssessmentQuery query, CancellationToken cancellationToken) => throw NotUsed();

    public ValueTask<IReadOnlyList<Assessment>> OverlappingAsync(SourceKey source, TimeWindow span, CancellationToken cancellationToken) => throw NotUsed();

    private static NotSupportedException NotUsed() => new("Not used by the alerts.");
}
