using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Assessments;

/// <summary>The assessments made, all revisions, and how far each source and criterion has been assessed.</summary>
public interface IAssessmentLedger
{
    /// <summary>
    /// Records an assessment; recording the same id again changes nothing. In the same transaction it moves the watermark of
    /// (source, criterion) to the end of the window where that is later, and queues the assessment for the alerts.
    /// </summary>
    ValueTask RecordAsync(Assessment assessment, CancellationToken cancellationToken) => RecordAsync([assessment], cancellationToken);

    /// <summary>The same for several assessments in one transaction: all are recorded, or none.</summary>
    ValueTask RecordAsync(IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken);

    /// <summary>Moves the watermark of a source and criterion to a later end; an earlier one changes nothing. For windows without readings.</summary>
    ValueTask MoveWatermarkAsync(SourceKey source, string criterion, Instant windowEnd, CancellationToken cancellationToken);

    /// <summary>End of the last window assessed for a source and criterion; null before the first.</summary>
    ValueTask<Instant?> WatermarkAsync(SourceKey source, string criterion, CancellationToken cancellationToken);

    /// <summary>The highest revision of the assessment of a window; null where there is none.</summary>
    ValueTask<Assessment?> FindAsync(SourceKey source, string criterion, string scope, TimeWindow window, CancellationToken cancellationToken);

    /// <summary>The assessment (any revision) of an id; null where there is none.</summary>
    ValueTask<Assessment?> FindAsync(string id, CancellationToken cancellationToken);

    /// <summary>The newest window's highest revision of each (source, criterion, scope).</summary>
    ValueTask<IReadOnlyList<Assessment>> LatestAsync(CancellationToken cancellationToken);

    /// <summary>Highest revisions, newest window first, one page at a time.</summary>
    ValueTask<AssessmentPage> ListAsync(AssessmentQuery query, CancellationToken cancellationToken);

    /// <summary>Assessments queued for the alerts after a sequence number, in order; at most <paramref name="count"/>.</summary>
    ValueTask<IReadOnlyList<(long Sequence, Assessment Assessment)>> QueuedAsync(long afterSequence, int count, CancellationToken cancellationToken);
}
