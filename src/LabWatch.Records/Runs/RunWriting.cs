using System.Text.Json.Nodes;
using LabWatch.Lab.Runs;
using LabWatch.Records.Audit;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Runs;

/// <summary>What belongs to one step of a run, inside the caller's transaction.</summary>
internal static class RunWriting
{
    public static async Task<RunOutcome> StartAsync(RecordsContext context, CalibrationRun run, string? requestKey, CancellationToken cancellationToken)
    {
        if (await AnsweredAsync(context, run, requestKey, cancellationToken) is { } answered)
        {
            return answered;
        }

        Guid? open = await context.Runs
            .Where(row => row.Site == run.Source.Site && row.Source == run.Source.Source && row.EndedAt == null && row.CancelledAt == null)
            .Select(row => (Guid?)row.Id)
            .FirstOrDefaultAsync(cancellationToken);
        if (open is { } other)
        {
            return new(RunProblem.SourceInUse, await ReadAsync(context, other, cancellationToken), false);
        }

        RunRow row = RunMapping.NewRow(run, (await context.Runs.MaxAsync(candidate => (long?)candidate.Number, cancellationToken) ?? 0) + 1);
        context.Runs.Add(row);
        RunStep step = new(1, run.StartedAt, run.StartedBy, RunStep.Started, run.OverrideReason, run);
        await AddAsync(context, row, step, requestKey, cancellationToken);
        return new(RunProblem.None, new RecordedRun(run, [step]), true);
    }

    /// <summary>The answer to a start that was recorded before; null where it is a new one.</summary>
    public static async Task<RunOutcome?> AnsweredAsync(RecordsContext context, CalibrationRun run, string? requestKey, CancellationToken cancellationToken)
    {
        if (await SameRequestAsync(context, run, requestKey, cancellationToken) is not { } known)
        {
            return null;
        }

        RecordedRun answered = (await ReadAsync(context, known, cancellationToken))!;
        return new(IsSameStart(answered.Steps[0].After, run) ? RunProblem.None : RunProblem.KeyReused, answered, false);
    }

    /// <summary>Adds a step to a run that is there.</summary>
    /// <param name="context">The context of the transaction.</param>
    /// <param name="id">Id of the run.</param>
    /// <param name="next">The step after a run, without its number; or why there is none. No step and no problem: nothing is to be done.</param>
    /// <param name="cancellationToken">Cancels the reads.</param>
    public static async Task<RunOutcome> StepAsync(
        RecordsContext context, Guid id, Func<CalibrationRun, (RunStep? Step, RunProblem Problem)> next, CancellationToken cancellationToken)
    {
        if (await ReadAsync(context, id, cancellationToken) is not { } recorded)
        {
            return new(RunProblem.Missing, null, false);
        }

        (RunStep? proposed, RunProblem problem) = next(recorded.Run);
        if (proposed is null)
        {
            return new(problem, recorded, false);
        }

        RunStep step = proposed with { Number = recorded.Steps.Count + 1 };
        RunRow row = await context.Runs.FirstAsync(candidate => candidate.Id == id, cancellationToken);
        await AddAsync(context, row, step, null, cancellationToken);
        return new(RunProblem.None, new RecordedRun(step.After, [.. recorded.Steps, step]), true);
    }

    public static async Task<RecordedRun?> ReadAsync(RecordsContext context, Guid id, CancellationToken cancellationToken) =>
        (await ReadAsync(context, [id], cancellationToken)).SingleOrDefault();

    /// <summary>Runs by their ids, in the order of the ids.</summary>
    public static async Task<IReadOnlyList<RecordedRun>> ReadAsync(RecordsContext context, IReadOnlyList<Guid> ids, CancellationToken cancellationToken)
    {
        List<RunStepRow> rows = await context.RunSteps.AsNoTracking().Where(row => ids.Contains(row.RunId)).OrderBy(row => row.Number).ToListAsync(cancellationToken);
        ILookup<Guid, RunStep> steps = rows.ToLookup(row => row.RunId, RunMapping.ToStep);
        return [.. ids.Where(steps.Contains).Select(id => new RecordedRun(steps[id].Last().After, [.. steps[id]]))];
    }

    private static async Task AddAsync(RecordsContext context, RunRow row, RunStep step, string? requestKey, CancellationToken cancellationToken)
    {
        RunMapping.Apply(step, row);
        RunStepRow added = RunMapping.ToRow(step, requestKey);
        context.RunSteps.Add(added);
        JsonObject facts = new() { ["source"] = step.After.Source.ToString(), ["jobNumber"] = step.After.JobNumber, ["what"] = step.What };
        if (step.Reason is not null)
        {
            facts["reason"] = step.Reason;
        }

        string action = step.What switch { RunStep.Started => "run-started", RunStep.Ended => "run-ended", _ => "run-corrected" };
        await AuditChain.CoverAsync(context, added, new AuditNote(row.Site, step.At, step.By, action, string.Empty, facts, null), cancellationToken);
    }

    private static async Task<Guid?> SameRequestAsync(RecordsContext context, CalibrationRun run, string? requestKey, CancellationToken cancellationToken)
    {
        Guid? byKey = requestKey is null
            ? null
            : await context.RunSteps
                .Where(row => row.Site == run.Source.Site && row.By == run.StartedBy && row.RequestKey == requestKey)
                .Select(row => (Guid?)row.RunId)
                .FirstOrDefaultAsync(cancellationToken);
        return byKey ?? await context.Runs.Where(row => row.Id == run.Id).Select(row => (Guid?)row.Id).FirstOrDefaultAsync(cancellationToken);
    }

    private static bool IsSameStart(CalibrationRun known, CalibrationRun asked) =>
        known with { Id = asked.Id, StartedAt = asked.StartedAt, ReadinessAtStart = asked.ReadinessAtStart } == asked;
}
