using LabWatch.Lab.Runs;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Runs;

/// <summary>
/// The calibration runs: which job used which source when. Steps are only ever added; a run is what its steps come to. A request that is
/// sent again under the same key adds nothing.
/// </summary>
public interface IRunLedger
{
    /// <summary>Records the start of a run. One run is open on a source at a time.</summary>
    /// <param name="run">The run; its id must be new, or that of the same start.</param>
    /// <param name="requestKey">What the client named the request by; null where it named none.</param>
    /// <param name="cancellationToken">Cancels the write.</param>
    ValueTask<RunOutcome> StartAsync(CalibrationRun run, string? requestKey, CancellationToken cancellationToken);

    /// <summary>The answer to a start that was recorded before, by its id or its key; null where it is a new one.</summary>
    ValueTask<RunOutcome?> AnsweredAsync(CalibrationRun run, string? requestKey, CancellationToken cancellationToken);

    /// <summary>Records the end of a run. Ending it again as the same person changes nothing.</summary>
    ValueTask<RunOutcome> EndAsync(Guid id, Instant at, string by, string? note, CancellationToken cancellationToken);

    /// <summary>Records a correction or a cancellation. A correction that changes nothing adds no step.</summary>
    ValueTask<RunOutcome> CorrectAsync(Guid id, Instant at, string by, RunCorrection correction, CancellationToken cancellationToken);

    /// <summary>The run of an id; null where there is none.</summary>
    ValueTask<RecordedRun?> FindAsync(Guid id, CancellationToken cancellationToken);

    /// <summary>Runs, latest start first, one page at a time.</summary>
    ValueTask<RunPage> ListAsync(RunQuery query, CancellationToken cancellationToken);

    /// <summary>The runs that last.</summary>
    ValueTask<IReadOnlyList<RecordedRun>> OpenAsync(CancellationToken cancellationToken);
}
