using System.Runtime.ExceptionServices;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records;

namespace LabWatch.Assessments.Planning;

/// <summary>All criteria of one source, in one configuration.</summary>
/// <param name="source">The source.</param>
/// <param name="fingerprint">Fingerprint of its certificates, installations and limits.</param>
/// <param name="criteria">One planner a criterion that applies.</param>
/// <param name="batch">Records what the criteria find.</param>
/// <param name="positions">Where the fingerprint of the last complete look at the inputs is stored.</param>
/// <param name="pending">Hours with new readings.</param>
internal sealed class SourcePlan(
    SourceKey source, long fingerprint, IReadOnlyList<SourcePlanner> criteria, WindowBatch batch, IPositionLedger positions, PendingHours pending)
{
    /// <summary>Rounds in one run, so that one source that catches up does not hold the others.</summary>
    private const int RoundsInOneRun = 8;

    private readonly string?[] _inputPages = new string?[criteria.Count];
    private int _inputCriterion = -1;
    private bool _inputsDone;

    private string InputsReader => $"assessments/inputs/{source}";

    public SourceKey Source => source;

    public int DueCount(Instant now) => criteria.Sum(criterion => criterion.DueCount(now));

    /// <summary>One run: due windows first, then hours that have become quiet, then changed inputs. Whether there is more to do at once.</summary>
    public async ValueTask<bool> RunAsync(Instant now, TimeSpan quiet, int hoursInOneRun, CancellationToken cancellationToken)
    {
        bool more = await WalkAsync(now, cancellationToken);
        IReadOnlyList<Instant> hours = pending.Quiet(source, quiet, hoursInOneRun);
        if (hours.Count > 0)
        {
            foreach (SourcePlanner criterion in criteria)
            {
                await criterion.RecheckAsync(hours, cancellationToken);
            }

            pending.Done(source, hours);
        }

        return await LookAtInputsAsync(cancellationToken) || more || hours.Count == hoursInOneRun;
    }

    private async ValueTask<bool> WalkAsync(Instant now, CancellationToken cancellationToken)
    {
        for (int round = 0; round < RoundsInOneRun; round++)
        {
            if (!await RoundAsync(now, cancellationToken))
            {
                return false;
            }
        }

        return DueCount(now) > 0;
    }

    /// <summary>
    /// Judges the next due windows of all criteria and records them in one transaction: criteria are due at the same moments, and a transaction costs more than
    /// a judgement. The defect of one criterion is thrown when the others have been recorded.
    /// </summary>
    private async ValueTask<bool> RoundAsync(Instant now, CancellationToken cancellationToken)
    {
        List<(SourcePlanner Criterion, DueWindows Windows)> due = [];
        ExceptionDispatchInfo? failure = null;
        foreach (SourcePlanner criterion in criteria)
        {
            try
            {
                if (await criterion.JudgeDueAsync(now, cancellationToken) is { } windows)
                {
                    due.Add((criterion, windows));
                }
            }
            catch (Exception exception) when (!cancellationToken.IsCancellationRequested)
            {
                failure ??= ExceptionDispatchInfo.Capture(exception);
            }
        }

        await batch.RecordAsync([.. due.SelectMany(item => item.Windows.Made)], cancellationToken);
        foreach ((SourcePlanner criterion, DueWindows windows) in due)
        {
            await criterion.DoneAsync(windows, cancellationToken);
        }

        failure?.Throw();
        return due.Count > 0;
    }

    private async ValueTask<bool> LookAtInputsAsync(CancellationToken cancellationToken)
    {
        if (_inputsDone)
        {
            return false;
        }

        if (_inputCriterion < 0)
        {
            _inputsDone = await positions.PositionAsync(InputsReader, cancellationToken) == fingerprint;
            _inputCriterion = 0;
            return !_inputsDone;
        }

        if (_inputCriterion < criteria.Count)
        {
            string? next = await criteria[_inputCriterion].RecheckInputsAsync(_inputPages[_inputCriterion], cancellationToken);
            _inputPages[_inputCriterion] = next;
            _inputCriterion += next is null ? 1 : 0;
            return true;
        }

        await positions.SetPositionAsync(InputsReader, fingerprint, cancellationToken);
        _inputsDone = true;
        return false;
    }
}
