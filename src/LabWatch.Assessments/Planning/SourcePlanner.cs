using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records.Assessments;

namespace LabWatch.Assessments.Planning;

/// <summary>
/// Walks one source's windows of one criterion. A window is met in one of two ways, never in both at once: by the walk, when it has just
/// become due, or with its hours, when those have been quiet after new readings.
/// </summary>
internal sealed class SourcePlanner(
    WindowEvaluator evaluator, IReadingStore store, IAssessmentLedger ledger, WindowBatch batch, PendingHours pending)
{
    /// <summary>Windows in one transaction and in one read.</summary>
    private const int ChunkLength = 36;

    /// <summary>
    /// A window that is later than this is history: its hours decide when it is looked at. Shorter outages (a locked database, a restart)
    /// are caught up at once, at the price of a superseded revision where readings are still coming in.
    /// </summary>
    private static readonly TimeSpan ShortlyAfter = TimeSpan.FromMinutes(30);

    private static readonly IReadOnlySet<Instant> NoHours = new HashSet<Instant>();

    private Instant? _cursor;

    private CriterionSchedule Schedule => evaluator.Criterion.Schedule;

    /// <summary>What this planner evaluates with.</summary>
    public WindowEvaluator Evaluator => evaluator;

    /// <summary>Windows that are due.</summary>
    public int DueCount(Instant now) =>
        _cursor is { } cursor && cursor < Schedule.LastDue(now) ? (int)Math.Min(int.MaxValue, (Schedule.LastDue(now) - cursor) / Schedule.Every) : 0;

    /// <summary>Judges the next windows that have become due, at most a chunk of them; null where none is.</summary>
    public async ValueTask<DueWindows?> JudgeDueAsync(Instant now, CancellationToken cancellationToken)
    {
        Instant last = Schedule.LastDue(now);
        _cursor ??= await ledger.WatermarkAsync(evaluator.Source, evaluator.Criterion.Code, cancellationToken)
            ?? await BeginningAsync(now, cancellationToken);
        if (_cursor is not { } cursor)
        {
            return null;
        }

        // After a step back of the clock windows come due that the watermark has passed. They are looked up again, and left alone where they stand.
        TimeWindow[] chunk = [.. Schedule.Ending(cursor > last ? last - Schedule.Every : cursor, last).Take(ChunkLength)];
        return chunk.Length == 0
            ? null
            : new(chunk[^1].End, await batch.JudgeAsync(evaluator, [.. chunk.Where(window => !IsLeftToItsHours(window, now))], cancellationToken));
    }

    /// <summary>Takes note that windows were recorded.</summary>
    public async ValueTask DoneAsync(DueWindows due, CancellationToken cancellationToken)
    {
        if (due.Made.Count == 0 || due.Made[^1].Window.End != due.End)
        {
            await ledger.MoveWatermarkAsync(evaluator.Source, evaluator.Criterion.Code, due.End, cancellationToken);
        }

        _cursor = due.End;
    }

    /// <summary>Assesses what new readings in some hours may have changed, or made possible, behind the walk.</summary>
    public async ValueTask RecheckAsync(IReadOnlyList<Instant> hours, CancellationToken cancellationToken)
    {
        HashSet<Instant> these = [.. hours];
        List<TimeWindow> windows =
            [.. hours.SelectMany(Schedule.Touching).Distinct().OrderBy(window => window.End)
                .Where(window => window.End <= _cursor && !pending.Touches(evaluator.Source, Schedule.SpanOf(window), these))];
        foreach (List<TimeWindow> chunk in Neighbours(windows))
        {
            await batch.AssessAsync(evaluator, chunk, cancellationToken);
        }
    }

    /// <summary>Assesses again what rests on other certificates or limits than those in force, one page at a time.</summary>
    /// <returns>Cursor of the next page; null after the last.</returns>
    public async ValueTask<string?> RecheckInputsAsync(string? after, CancellationToken cancellationToken)
    {
        AssessmentPage page = await ledger.ListAsync(new AssessmentQuery(evaluator.Source, evaluator.Criterion.Code, null, after, 500), cancellationToken);
        List<TimeWindow> windows =
            [.. page.Items.Where(evaluator.InputsDiffer).Select((Assessment item) => item.Window).Distinct().OrderBy(window => window.End)];
        foreach (List<TimeWindow> chunk in Neighbours(windows))
        {
            await batch.AssessAsync(evaluator, chunk, cancellationToken);
        }

        return page.Next;
    }

    private bool IsLeftToItsHours(TimeWindow window, Instant now) =>
        now - window.End > Schedule.Grace + ShortlyAfter && pending.Touches(evaluator.Source, Schedule.SpanOf(window), NoHours);

    /// <summary>The walk begins with the first hour that has readings; null where there is none yet.</summary>
    private async ValueTask<Instant?> BeginningAsync(Instant now, CancellationToken cancellationToken)
    {
        IReadOnlyList<SourceHourRead> hours = await store.HoursAsync(evaluator.Source, new TimeWindow(default, now), cancellationToken);
        return hours.Count == 0 ? null : Schedule.EndAtOrBefore(hours[0].Hour);
    }

    private static IEnumerable<List<TimeWindow>> Neighbours(List<TimeWindow> windows)
    {
        List<TimeWindow> chunk = [];
        foreach (TimeWindow window in windows)
        {
            if (chunk.Count == ChunkLength || (chunk.Count > 0 && window.Start - chunk[^1].End > TimeSpan.FromHours(1)))
            {
                yield return chunk;
                chunk = [];
            }

            chunk.Add(window);
        }

        if (chunk.Count > 0)
        {
            yield return chunk;
        }
    }
}
