using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records;

namespace LabWatch.Assessments.Planning;

/// <summary>All criteria of one source, in one configuration.</summary>
/// <param name="source">The source.</param>
/// <param name="fingerprint">Fingerprint of its certificates, installations and limits.</param>
/// <param name="criteria">One planner a criterion that applies.</param>
/// <param name="positions">Where the fingerprint of the last complete look at the inputs is stored.</param>
/// <param name="pending">Hours with new readings.</param>
internal sealed class SourcePlan(
    SourceKey source, long fingerprint, IReadOnlyList<SourcePlanner> criteria, IPositionLedger positions, PendingHours pending)
{
    private readonly string?[] _inputPages = new string?[criteria.Count];
    private int _inputCriterion = -1;
    private bool _inputsDone;

    private string InputsReader => $"assessments/inputs/{source}";

    public SourceKey Source => source;

    public int DueCount(Instant now) => criteria.Sum(criterion => criterion.DueCount(now));

    /// <summary>One run: due windows first, then hours that have become quiet, then changed inputs. Whether there is more to do at once.</summary>
    public async ValueTask<bool> RunAsync(Instant now, TimeSpan quiet, int hoursInOneRun, CancellationToken cancellationToken)
    {
        bool more = false;
        foreach (SourcePlanner criterion in criteria)
        {
            more |= await criterion.WalkAsync(now, cancellationToken);
        }

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
