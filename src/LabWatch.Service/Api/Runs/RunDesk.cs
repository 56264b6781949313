using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Records.Runs;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Runs;

/// <summary>Records the steps of runs by the rules, and lets pages see them at once.</summary>
internal sealed class RunDesk(IRunLedger ledger, OpenRuns open, SiteBoard board)
{
    /// <summary>Starts a run, or says why not.</summary>
    public async ValueTask<(RunOutcome? Outcome, IReadOnlyList<Finding> Refusal, bool IsForbidden)> StartAsync(
        LabSnapshot lab, ReferenceSource source, CalibrationRun run, string? key, Caller caller, CancellationToken cancellationToken)
    {
        // A request that was answered is answered again, whatever has become of the source since.
        if (await ledger.AnsweredAsync(run, key, cancellationToken).ConfigureAwait(false) is { } answered)
        {
            return (answered, [], false);
        }

        SourceStatusView status = await board.StatusAsync(source, board.OpenAlerts(), cancellationToken).ConfigureAwait(false);
        (IReadOnlyList<Finding> refusal, bool isForbidden) = RunRules.Refusal(lab, source, status, run, caller);
        return refusal.Count > 0
            ? (null, refusal, isForbidden)
            : (await ChangedAsync(ledger.StartAsync(run with { ReadinessAtStart = status.Readiness.State }, key, cancellationToken)).ConfigureAwait(false), [], false);
    }

    /// <summary>Ends a run.</summary>
    public ValueTask<RunOutcome> EndAsync(Guid id, Instant at, string by, string? note, CancellationToken cancellationToken) =>
        ChangedAsync(ledger.EndAsync(id, at, by, note, cancellationToken));

    /// <summary>Corrects or cancels a run.</summary>
    public ValueTask<RunOutcome> CorrectAsync(Guid id, Instant at, string by, RunCorrection correction, CancellationToken cancellationToken) =>
        ChangedAsync(ledger.CorrectAsync(id, at, by, correction, cancellationToken));

    private async ValueTask<RunOutcome> ChangedAsync(ValueTask<RunOutcome> step)
    {
        RunOutcome outcome = await step.ConfigureAwait(false);
        await open.ForgetAsync().ConfigureAwait(false);
        return outcome;
    }
}
