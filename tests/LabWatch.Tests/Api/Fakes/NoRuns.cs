using LabWatch.Lab.Runs;
using LabWatch.Lab.Time;
using LabWatch.Records.Runs;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>A ledger of runs that has none and takes none.</summary>
internal sealed class NoRuns : IRunLedger
{
    public ValueTask<RunOutcome> StartAsync(CalibrationRun run, string? requestKey, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<RunOutcome?> AnsweredAsync(CalibrationRun run, string? requestKey, CancellationToken cancellationToken) => new((RunOutcome?)null);

    public ValueTask<RunOutcome> EndAsync(Guid id, Instant at, string by, string? note, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<RunOutcome> CorrectAsync(Guid id, Instant at, string by, RunCorrection correction, CancellationToken cancellationToken) => throw new NotSupportedException();

    public ValueTask<RecordedRun?> FindAsync(Guid id, CancellationToken cancellationToken) => new((RecordedRun?)null);

    public ValueTask<RunPage> ListAsync(RunQuery query, CancellationToken cancellationToken) => new(new RunPage([], null));

    public ValueTask<IReadOnlyList<RecordedRun>> OpenAsync(CancellationToken cancellationToken) => new([]);
}
