using LabWatch.Lab.Runs;
using LabWatch.Lab.Time;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Runs;

/// <summary>The calibration runs in the records database.</summary>
internal sealed class RunLedger(RecordsDatabase database) : IRunLedger
{
    public ValueTask<RunOutcome> StartAsync(CalibrationRun run, string? requestKey, CancellationToken cancellationToken) =>
        database.WriteAsync(context => RunWriting.StartAsync(context, run, requestKey, cancellationToken), cancellationToken);

    public async ValueTask<RunOutcome?> AnsweredAsync(CalibrationRun run, string? requestKey, CancellationToken cancellationToken) =>
        await database.ReadAsync(context => RunWriting.AnsweredAsync(context, run, requestKey, cancellationToken), cancellationToken);

    public ValueTask<RunOutcome> EndAsync(Guid id, Instant at, string by, string? note, CancellationToken cancellationToken) =>
        StepAsync(
            id,
            run => run switch
            {
                { Cancelled: true } => (null, RunProblem.Cancelled),
                { EndedBy: { } former } => (null, string.Equals(former, by, StringComparison.Ordinal) ? RunProblem.None : RunProblem.EndedAlready),
                _ => (new RunStep(0, at, by, RunStep.Ended, null, run with { EndedAt = at, EndedBy = by, Note = note ?? run.Note }), RunProblem.None),
            },
            cancellationToken);

    public ValueTask<RunOutcome> CorrectAsync(Guid id, Instant at, string by, RunCorrection correction, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(correction);
        return StepAsync(id, run => Correct(run, at, by, correction), cancellationToken);
    }

    public async ValueTask<RecordedRun?> FindAsync(Guid id, CancellationToken cancellationToken) =>
        await database.ReadAsync(context => RunWriting.ReadAsync(context, id, cancellationToken), cancellationToken);

    public async ValueTask<RunPage> ListAsync(RunQuery query, CancellationToken cancellationToken)
    {
        PageCursor? after = PageCursor.Of(query.After);
        return await database.ReadAsync(
            async context =>
            {
                var rows = await Matching(context, query, after).Select(row => new { row.Id, row.StartedAt, row.Number }).Take(query.Count + 1).ToListAsync(cancellationToken);
                var last = rows.Count > query.Count ? rows[query.Count - 1] : null;
                return new RunPage(
                    await RunWriting.ReadAsync(context, [.. rows.Take(query.Count).Select(row => row.Id)], cancellationToken),
                    last is null ? null : new PageCursor(last.StartedAt, last.Number).ToString());
            },
            cancellationToken);
    }

    public async ValueTask<IReadOnlyList<RecordedRun>> OpenAsync(CancellationToken cancellationToken) =>
        await database.ReadAsync(
            async context => await RunWriting.ReadAsync(
                context,
                await context.Runs.Where(row => row.EndedAt == null && row.CancelledAt == null).OrderBy(row => row.Number).Select(row => row.Id).ToListAsync(cancellationToken),
                cancellationToken),
            cancellationToken);

    private ValueTask<RunOutcome> StepAsync(Guid id, Func<CalibrationRun, (RunStep? Step, RunProblem Problem)> next, CancellationToken cancellationToken) =>
        database.WriteAsync(context => RunWriting.StepAsync(context, id, next, cancellationToken), cancellationToken);

    private static (RunStep? Step, RunProblem Problem) Correct(CalibrationRun run, Instant at, string by, RunCorrection correction)
    {
        CalibrationRun after = run with
        {
            JobNumber = correction.JobNumber ?? run.JobNumber,
            Item = correction.Item ?? run.Item,
            SetPointCelsius = correction.SetPointCelsius ?? run.SetPointCelsius,
            Band = correction.Band ?? run.Band,
            Note = correction.Note ?? run.Note,
            Cancelled = run.Cancelled || correction.Cancelled,
        };
        return after == run ? (null, RunProblem.None)
            : run.Cancelled ? (null, RunProblem.Cancelled)
            : (new RunStep(0, at, by, after.Cancelled ? RunStep.Cancelled : RunStep.Corrected, correction.Reason, after), RunProblem.None);
    }

    private static IQueryable<RunRow> Matching(RecordsContext context, RunQuery query, PageCursor? after)
    {
        IQueryable<RunRow> rows = context.Runs;
        if (query.Source is { } source)
        {
            rows = rows.Where(row => row.Site == source.Site && row.Source == source.Source);
        }

        if (query.OpenOnly)
        {
            rows = rows.Where(row => row.EndedAt == null && row.CancelledAt == null);
        }

        if (after is { } cursor)
        {
            rows = rows.Where(row => row.StartedAt < cursor.Time || (row.StartedAt == cursor.Time && row.Number < cursor.Number));
        }

        return rows.OrderByDescending(row => row.StartedAt).ThenByDescending(row => row.Number);
    }
}
