using System.Runtime.CompilerServices;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records.Assessments;

namespace LabWatch.Assessments.Recomputation;

/// <summary>
/// Computes assessments on record again, from the readings, certificates, limits and descriptions that are on record now, and compares.
/// On the same platform and version the same inputs give the same bits.
/// </summary>
/// <param name="store">The readings.</param>
/// <param name="ledger">The assessments.</param>
/// <param name="criteria">All criteria.</param>
/// <param name="options">Names the version that recomputes.</param>
/// <param name="clock">Dates what is recorded.</param>
public sealed class Recomputer(IReadingStore store, IAssessmentLedger ledger, IEnumerable<ICriterion> criteria, AssessmentsOptions options, TimeProvider clock)
{
    private const int PageLength = 240;

    /// <summary>
    /// The assessments that stand, computed again: by source and criterion, newest window first. Where a reason is given, those that differ
    /// or rest on other inputs are superseded by a revision before they are returned; breaking off and asking again goes on where it was.
    /// </summary>
    public async IAsyncEnumerable<RecomputedAssessment> RunAsync(
        LabSnapshot snapshot, RecomputeRequest request, [EnumeratorCancellation] CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(snapshot);
        ArgumentNullException.ThrowIfNull(request);
        foreach (SourceKey source in snapshot.Sources.Select(source => source.Key).Where(request.Wants))
        {
            foreach (ICriterion criterion in criteria.Where(criterion => request.Wants(criterion.Code)))
            {
                WindowEvaluator evaluator = new(snapshot, source, criterion, options.ProgramVersion);
                string? after = null;
                do
                {
                    AssessmentPage page = await ledger.ListAsync(new AssessmentQuery(source, criterion.Code, request.Window, after, PageLength), cancellationToken);
                    foreach (RecomputedAssessment item in await RecordAsync(await PageAsync(evaluator, page.Items, cancellationToken), request.Reason, cancellationToken))
                    {
                        yield return item;
                    }

                    after = page.Next;
                }
                while (after is not null);
            }
        }
    }

    private async ValueTask<List<(Assessment Standing, Assessment? Again)>> PageAsync(WindowEvaluator evaluator, IReadOnlyList<Assessment> standing, CancellationToken cancellationToken)
    {
        List<(Assessment, Assessment?)> pairs = [];
        Instant now = Instant.Now(clock);
        foreach (IReadOnlyList<IGrouping<TimeWindow, Assessment>> near in Neighbours([.. standing.GroupBy(item => item.Window)], evaluator.Criterion.Schedule))
        {
            cancellationToken.ThrowIfCancellationRequested();
            TimeWindow[] windows = [.. near.Select(group => group.Key)];
            TimeWindow span = new(evaluator.Criterion.Schedule.SpanOf(windows[^1]).Start, windows[0].End);
            IReadOnlyList<string> channels = evaluator.Channels(windows);
            ReadingWindow? readings = channels.Count == 0 ? null : await store.ReadAsync(evaluator.Source, channels, span, cancellationToken);
            foreach (IGrouping<TimeWindow, Assessment> group in near)
            {
                IReadOnlyList<Assessment> again = readings is null ? [] : evaluator.Evaluate(group.Key, readings, [], now);
                pairs.AddRange(group.Select(item => (item, again.FirstOrDefault(fresh => string.Equals(fresh.Scope, item.Scope, StringComparison.Ordinal)))));
            }
        }

        return pairs;
    }

    /// <summary>Windows, newest first, that are near enough to each other to be read at once: at most six hours.</summary>
    private static IEnumerable<IReadOnlyList<IGrouping<TimeWindow, Assessment>>> Neighbours(List<IGrouping<TimeWindow, Assessment>> groups, CriterionSchedule schedule)
    {
        for (int first = 0, next; first < groups.Count; first = next)
        {
            Instant earliest = groups[first].Key.End - TimeSpan.FromHours(6) - schedule.Window;
            for (next = first + 1; next < groups.Count && groups[next].Key.End >= earliest; next++)
            {
            }

            yield return groups.GetRange(first, next - first);
        }
    }

    private async ValueTask<IReadOnlyList<RecomputedAssessment>> RecordAsync(
        List<(Assessment Standing, Assessment? Again)> pairs, string? reason, CancellationToken cancellationToken)
    {
        RecomputedAssessment[] compared = [.. pairs.Select(pair => Compare(pair.Standing, pair.Again, reason))];
        Assessment[] superseding = [.. compared.Select(item => item.Superseding).OfType<Assessment>().OrderBy(item => item.Window.End)];
        if (superseding.Length > 0)
        {
            await ledger.RecordAsync(superseding, cancellationToken);
        }

        return compared;
    }

    private RecomputedAssessment Compare(Assessment standing, Assessment? again, string? reason)
    {
        if (again is null)
        {
            return Withdrawal.Is(standing)
                ? new(standing, Agreement.Identical, string.Empty, null)
                : new(standing, Agreement.NotPossible, "Its readings are no longer there, or the source does not have what it is about", null);
        }

        (Agreement agreement, string difference) = AssessmentComparison.Of(standing, again);
        Assessment? superseding = reason is null || agreement is Agreement.Identical or Agreement.Agrees
            ? null
            : again with { Revision = standing.Revision + 1, SupersedeReason = $"{reason.TrimEnd('.')}: {Explain(standing, agreement, difference)}" };
        return new(standing, agreement, difference, superseding);
    }

    private string Explain(Assessment standing, Agreement agreement, string difference) => agreement is Agreement.InputsChanged
        ? difference
        : $"computed again by version {options.ProgramVersion} instead of {standing.Provenance.ProgramVersion}: {difference}.";
}
