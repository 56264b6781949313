using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records.Assessments;

namespace LabWatch.Assessments.Planning;

/// <summary>
/// Assesses some windows of one source by one criterion: looks up what stands, reads once, and evaluates; what comes of it is recorded in one
/// transaction. Doing it again changes nothing.
/// </summary>
internal sealed class WindowBatch(IReadingStore store, IAssessmentLedger ledger, PlannerState state, TimeProvider clock)
{
    private const int PageLength = 500;

    /// <summary>Assesses those windows whose evidence differs from what stands.</summary>
    /// <param name="evaluator">Source, criterion and configuration.</param>
    /// <param name="windows">Windows in rising order, near to each other.</param>
    /// <param name="cancellationToken">Cancels it; what is recorded stays.</param>
    public async ValueTask AssessAsync(WindowEvaluator evaluator, IReadOnlyList<TimeWindow> windows, CancellationToken cancellationToken) =>
        await RecordAsync(await JudgeAsync(evaluator, windows, cancellationToken), cancellationToken);

    /// <summary>Records assessments, of one criterion or of several, in one transaction.</summary>
    public async ValueTask RecordAsync(IReadOnlyList<Assessment> made, CancellationToken cancellationToken)
    {
        if (made.Count > 0)
        {
            await ledger.RecordAsync(made, cancellationToken);
            state.Recorded(made.Count);
        }
    }

    /// <summary>What there is to record of some windows, in rising order of their ends; empty where the evidence is what stands.</summary>
    /// <param name="evaluator">Source, criterion and configuration.</param>
    /// <param name="windows">Windows in rising order, near to each other.</param>
    /// <param name="cancellationToken">Cancels it.</param>
    public async ValueTask<IReadOnlyList<Assessment>> JudgeAsync(WindowEvaluator evaluator, IReadOnlyList<TimeWindow> windows, CancellationToken cancellationToken)
    {
        if (windows.Count == 0)
        {
            return [];
        }

        ILookup<TimeWindow, Assessment> standing = await StandingAsync(evaluator, windows, cancellationToken);
        IReadOnlyList<SourceHourRead> hours = await store.HoursAsync(evaluator.Source, Span(evaluator, windows), cancellationToken);
        List<TimeWindow> open = [.. windows.Where(window => MayDiffer(evaluator, window, [.. standing[window]], hours))];
        return open.Count == 0 ? [] : await EvaluateAsync(evaluator, open, standing, cancellationToken);
    }

    private async ValueTask<IReadOnlyList<Assessment>> EvaluateAsync(
        WindowEvaluator evaluator, List<TimeWindow> windows, ILookup<TimeWindow, Assessment> standing, CancellationToken cancellationToken)
    {
        ReadingWindow readings = await store.ReadAsync(evaluator.Source, evaluator.Channels(windows), Span(evaluator, windows), cancellationToken);
        Instant now = Instant.Now(clock);
        List<Assessment> made = [];
        foreach (TimeWindow window in windows)
        {
            cancellationToken.ThrowIfCancellationRequested();
            made.AddRange(evaluator.Evaluate(window, readings, [.. standing[window]], now));
        }

        return made;
    }

    /// <summary>
    /// Whether a window has to be read: it has readings and no assessment, or hours that changed since, or other certificates or limits.
    /// </summary>
    private static bool MayDiffer(
        WindowEvaluator evaluator, TimeWindow window, IReadOnlyList<Assessment> standing, IReadOnlyList<SourceHourRead> hours)
    {
        TimeWindow span = evaluator.Criterion.Schedule.SpanOf(window);
        return standing.Count == 0
            ? HoursIn(hours, window).Any()
            : standing.Any(item => !item.Provenance.Hours.SequenceEqual(HoursIn(hours, span)) || evaluator.InputsDiffer(item));
    }

    private static IEnumerable<SourceHourRead> HoursIn(IReadOnlyList<SourceHourRead> hours, TimeWindow span) =>
        hours.Where(hour => hour.Hour < span.End && hour.Hour.Microseconds + Instant.MicrosecondsPerHour > span.Start.Microseconds);

    private static TimeWindow Span(WindowEvaluator evaluator, IReadOnlyList<TimeWindow> windows) =>
        new(evaluator.Criterion.Schedule.SpanOf(windows[0]).Start, windows[^1].End);

    private async ValueTask<ILookup<TimeWindow, Assessment>> StandingAsync(
        WindowEvaluator evaluator, IReadOnlyList<TimeWindow> windows, CancellationToken cancellationToken)
    {
        TimeWindow ends = new(windows[0].End, new Instant(windows[^1].End.Microseconds + 1));
        List<Assessment> found = [];
        string? after = null;
        do
        {
            AssessmentPage page = await ledger.ListAsync(
                new AssessmentQuery(evaluator.Source, evaluator.Criterion.Code, ends, after, PageLength), cancellationToken);
            found.AddRange(page.Items);
            after = page.Next;
        }
        while (after is not null);
        return found.ToLookup(item => item.Window);
    }
}
