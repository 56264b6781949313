using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Assessments;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>Assessments in memory.</summary>
internal sealed class FakeAssessments : IAssessmentLedger
{
    private readonly List<Assessment> _all = [];

    public AssessmentQuery? LastQuery { get; private set; }

    public void Add(Assessment assessment) => _all.Add(assessment);

    public ValueTask RecordAsync(Assessment assessment, CancellationToken cancellationToken)
    {
        Add(assessment);
        return default;
    }

    public ValueTask RecordAsync(IReadOnlyList<Assessment> assessments, CancellationToken cancellationToken)
    {
        _all.AddRange(assessments);
        return default;
    }

    public ValueTask MoveWatermarkAsync(SourceKey source, string criterion, Instant to, CancellationToken cancellationToken) => default;

    public ValueTask<Instant?> WatermarkAsync(SourceKey source, string criterion, CancellationToken cancellationToken) => new((Instant?)null);

    public ValueTask<Assessment?> FindAsync(SourceKey source, string criterion, string scope, TimeWindow window, CancellationToken cancellationToken) => new((Assessment?)null);

    public ValueTask<Assessment?> FindAsync(string id, CancellationToken cancellationToken) => new(_all.Find(assessment => assessment.Id == id));

    public ValueTask<IReadOnlyList<Assessment>> LatestAsync(CancellationToken cancellationToken) =>
        new([.. _all.GroupBy(assessment => (assessment.Source, assessment.Criterion, assessment.Scope)).Select(group => group.MaxBy(assessment => assessment.Window.End)!)]);

    public ValueTask<AssessmentPage> ListAsync(AssessmentQuery query, CancellationToken cancellationToken)
    {
        LastQuery = query;
        List<Assessment> matching =
            [.. _all.Where(assessment => (query.Source ?? assessment.Source) == assessment.Source && (query.Criterion ?? assessment.Criterion) == assessment.Criterion)];
        return new(new AssessmentPage([.. matching.OrderByDescending(assessment => assessment.Window.End).Take(query.Count)], matching.Count > query.Count ? "more" : null));
    }

    public ValueTask<IReadOnlyList<(long Sequence, Assessment Assessment)>> QueuedAsync(long afterSequence, int count, CancellationToken cancellationToken) => new([]);
}
