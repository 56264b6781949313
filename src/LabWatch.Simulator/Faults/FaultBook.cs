using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Simulator.Sources;

namespace LabWatch.Simulator.Faults;

/// <summary>
/// The commanded faults of a lab, past ones included. What they do at a moment follows from their times alone, so a state restored from before a command
/// relives it alike. Safe for use by several threads.
/// </summary>
internal sealed class FaultBook
{
    private readonly Lock _gate = new();
    private readonly IReadOnlyList<SourceDesign> _designs;
    private ActiveFault[] _commanded;

    /// <summary>A book with the commands of an earlier run.</summary>
    public FaultBook(IReadOnlyList<SourceDesign> designs, IEnumerable<ActiveFault> commanded)
    {
        _designs = designs;
        _commanded = [.. commanded];
    }

    /// <summary>All commands, past ones included.</summary>
    public IReadOnlyList<ActiveFault> Commanded => _commanded;

    /// <summary>Takes an order that works from an instant on; findings where it cannot be done.</summary>
    public IReadOnlyList<Finding> Inject(FaultOrder order, Instant start)
    {
        IReadOnlyList<Finding> findings = FaultChecks.Check(order, _designs);
        if (findings.Count > 0)
        {
            return findings;
        }

        lock (_gate)
        {
            int number = 1 + _commanded.Select(fault => int.Parse(fault.Id.AsSpan(2), System.Globalization.CultureInfo.InvariantCulture)).DefaultIfEmpty(0).Max();
            ActiveFault fault = new(FormattableString.Invariant($"f-{number}"), order, start, order.Duration is { } duration ? start + duration : null, Scheduled: false);
            _commanded = [.. _commanded, fault];
        }

        return [];
    }

    /// <summary>Repairs a commanded fault at an instant; a finding where there is none of that id to repair.</summary>
    public IReadOnlyList<Finding> Clear(string id, Instant at)
    {
        lock (_gate)
        {
            int index = Array.FindIndex(_commanded, fault => string.Equals(fault.Id, id, StringComparison.Ordinal) && (fault.End is not { } end || end > at));
            if (index < 0)
            {
                return [new Finding("unknown-fault", "id", "No commanded fault of this id is active.", Finding.Quote(id), "Take an id from the list of active faults; scheduled ones end by themselves.")];
            }

            ActiveFault[] copy = [.. _commanded];
            copy[index] = copy[index] with { End = at > copy[index].Start ? at : copy[index].Start };
            _commanded = copy;
        }

        return [];
    }

    /// <summary>Forgets commands that ended before an instant.</summary>
    public void Forget(Instant endedBefore)
    {
        lock (_gate)
        {
            _commanded = [.. _commanded.Where(fault => fault.End is not { } end || end >= endedBefore)];
        }
    }
}
