using System.Diagnostics;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Assessments;

namespace LabWatch.Benchmarks.Assessments;

/// <summary>A ledger with the time that is spent in it.</summary>
internal sealed class TimedLedger(IAssessmentLedger inner) : IAssessmentLedger
{
    private long _reading;
    private long _recording;

    public TimeSpan Reading => Stopwatch.GetElapsedTime(0, Interlocked.Read(ref _reading));

    public TimeSpan Recording => Stopwatch.GetElapsedTime(0, Interlocked.Read(ref _recording));

    public void Reset() => (_reading, _recording) = (0, 0);

    public async ValueTask RecordAsync(IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken)
    {
        long start = Stopwatch.GetTimestamp();
        await inner.RecordAsync(assessments, cancellationToken);
        Interlocked.Add(ref _recording, Stopwatch.GetTimestamp() - start);
    }

    public async ValueTask MoveWatermarkAsync(SourceKey source, string criterion, Instant windowEnd, CancellationToken cancellationToken)
    {
        long start = Stopwatch.GetTimestamp();
        await inner.MoveWatermarkAsync(source, criterion, windowEnd, cancellationToken);
        Interlocked.Add(ref _recording, Stopwatch.GetTimestamp() - start);
    }

    public async ValueTask<Instant?> WatermarkAsync(SourceKey source, string criterion, CancellationToken cancellationToken) =>
        await ReadAsync(() => inner.WatermarkAsync(source, criterion, cancellationToken));

    public async ValueTask<AssessmentPage> ListAsync(AssessmentQuery query, CancellationToken cancellationToken) =>
        await ReadAsync(() => inner.ListAsync(query, cancellationToken));

    public ValueTask<Assessment?> FindAsync(SourceKey source, string criterion, string scope, TimeWindow window, CancellationToken cancellationToken) =>
        inner.FindAsync(source, criterion, scope, window, cancellationToken);

    public ValueTask<Assessment?> FindAsync(string id, CancellationToken cancellationToken) => inner.FindAsync(id, cancellationToken);

    public ValueTask<IReadOnlyList<Assessment>> LatestAsync(CancellationToken cancellationToken) => inner.LatestAsync(cancellationToken);

    public ValueTask<IReadOnlyList<Assessment>> OverlappingAsync(SourceKey source, TimeWindow span, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<IReadOnlyList<(long Sequence, Assessment Assessment)>> QueuedAsync(long afterSequence, int count, CancellationToken cancellationToken) =>
        inner.QueuedAsync(afterSequence, count, cancellationToken);

    private async ValueTask<T> ReadAsync<T>(Func<ValueTask<T>> read)
    {
        long start = Stopwatch.GetTimestamp();
        T answer = await read();
        Interlocked.Add(ref _reading, Stopwatch.GetTimestamp() - start);
        return answer;
    }
}
