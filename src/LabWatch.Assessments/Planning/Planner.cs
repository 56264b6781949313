using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Assessments;
using Microsoft.Extensions.Logging;

namespace LabWatch.Assessments.Planning;

/// <summary>
/// Finds what has to be assessed and gets it done. It is woken often and asks each time: which windows are due by the stored watermarks,
/// which hours have new readings, which certificates or limits changed. So it owes nothing to having been awake at a certain moment, and
/// whatever was broken off is found again.
/// </summary>
internal sealed class Planner : IDisposable
{
    internal const string ChangesReader = "assessments/reading-changes";
    private const int HoursInOneRun = 24;

    private readonly IReadingStore _store;
    private readonly IAssessmentLedger _ledger;
    private readonly IPositionLedger _positions;
    private readonly ILabSnapshotSource _snapshots;
    private readonly ICriterion[] _criteria;
    private readonly AssessmentsOptions _options;
    private readonly PlannerState _state;
    private readonly TimeProvider _clock;
    private readonly ILogger<Planner> _logger;
    private readonly PendingHours _pending;
    private readonly WindowBatch _batch;
    private readonly SemaphoreSlim _running = new(1, 1);
    private LabSnapshot? _snapshot;
    private List<SourcePlan> _plans = [];
    private long? _storedChange;

    public Planner(
        IReadingStore store,
        IAssessmentLedger ledger,
        IPositionLedger positions,
        ILabSnapshotSource snapshots,
        IEnumerable<ICriterion> criteria,
        AssessmentsOptions options,
        PlannerState state,
        TimeProvider clock,
        ILogger<Planner> logger)
    {
        (_store, _ledger, _positions, _snapshots, _options, _state, _clock, _logger) = (store, ledger, positions, snapshots, options, state, clock, logger);
        _criteria = [.. criteria];
        _pending = new PendingHours(clock);
        _batch = new WindowBatch(store, ledger, state, clock);
    }

    /// <summary>
    /// One run. Whether there is more to do at once. Failures are logged, shown in the state, and tried again by the next run.
    /// </summary>
    public async ValueTask<bool> RunAsync(CancellationToken cancellationToken)
    {
        await _running.WaitAsync(cancellationToken);
        try
        {
            _state.Started();
            return await RunOnceAsync(cancellationToken);
        }
        catch (Exception exception) when (!cancellationToken.IsCancellationRequested)
        {
            // Outermost: nothing is lost, because what was not recorded is still due at the next wake-up.
            Report(exception);
            return false;
        }
        finally
        {
            _running.Release();
        }
    }

    /// <inheritdoc/>
    public void Dispose() => _running.Dispose();

    private async ValueTask<bool> RunOnceAsync(CancellationToken cancellationToken)
    {
        TakeSnapshot();
        await NoteChangesAsync(cancellationToken);
        Instant now = Instant.Now(_clock);
        _state.Waiting(_plans.Sum(plan => plan.DueCount(now)), _pending.Count);
        int more = 0, failed = 0;
        ParallelOptions bounded = new() { MaxDegreeOfParallelism = _options.Concurrency, CancellationToken = cancellationToken };
        await Parallel.ForEachAsync(_plans, bounded, async (plan, token) =>
        {
            try
            {
                Interlocked.Add(ref more, await plan.RunAsync(now, _options.HourQuiet, HoursInOneRun, token) ? 1 : 0);
            }
            catch (Exception exception) when (!token.IsCancellationRequested)
            {
                // One source's failure (a locked database, a defect in a criterion) leaves its windows due and does not hold the others.
                Report(exception);
                Interlocked.Increment(ref failed);
            }
        });
        await StoreChangeAsync(cancellationToken);
        _state.Waiting(_plans.Sum(plan => plan.DueCount(now)), _pending.Count);
        if (failed == 0)
        {
            _state.Succeeded();
        }

        return more > 0 && failed == 0;
    }

    private void TakeSnapshot()
    {
        LabSnapshot snapshot = _snapshots.Current;
        if (!ReferenceEquals(snapshot, _snapshot))
        {
            _plans = [.. snapshot.Sources.Select(source => Plan(snapshot, source))];
            _snapshot = snapshot;
        }
    }

    private SourcePlan Plan(LabSnapshot snapshot, ReferenceSource source) => new(
        source.Key,
        InputFingerprint.Of(snapshot, source.Key),
        [.. _criteria
            .Select(criterion => new WindowEvaluator(snapshot, source.Key, criterion, _options.ProgramVersion))
            .Where(evaluator => evaluator.Applies)
            .Select(evaluator => new SourcePlanner(evaluator, _store, _ledger, _batch, _pending))],
        _batch,
        _positions,
        _pending);

    private async ValueTask NoteChangesAsync(CancellationToken cancellationToken)
    {
        if (_storedChange is null)
        {
            _storedChange = await _positions.PositionAsync(ChangesReader, cancellationToken);
            _pending.StartAfter(_storedChange.Value);
        }

        ChangedHours changed = await _store.ChangesAsync(_pending.Change, cancellationToken);
        if (changed.Change < _pending.Change)
        {
            // Another store (restored, or exchanged) counts anew.
            _pending.StartAfter(0);
            changed = await _store.ChangesAsync(0, cancellationToken);
        }

        _pending.Note(changed.Change, changed.Hours);
        _pending.KeepOnly(_plans.Select(plan => plan.Source).ToHashSet());
    }

    private async ValueTask StoreChangeAsync(CancellationToken cancellationToken)
    {
        long safe = _pending.SafeChange;
        if (safe != _storedChange)
        {
            await _positions.SetPositionAsync(ChangesReader, safe, cancellationToken);
            _storedChange = safe;
        }
    }

    private void Report(Exception exception)
    {
        _state.Failed(exception.Message);
        if (exception is StoreUnavailableException or RecordsUnavailableException)
        {
            AssessmentsLog.Unavailable(_logger, exception.Message);
        }
        else
        {
            AssessmentsLog.Failed(_logger, exception);
        }
    }
}
