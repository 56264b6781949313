using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Simulator;
using LabWatch.Simulator.Demo;
using LabWatch.Simulator.Faults;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>A demo that only remembers what was asked of it.</summary>
internal sealed class FakeDemo(TimeProvider clock) : ILabSimulation, IDemoProgress
{
    private readonly List<ActiveFault> _active = [];

    public Instant Now => Instant.Now(clock);

    public IReadOnlyList<ActiveFault> ActiveFaults => [.. _active];

    public HistoryProgress Current { get; set; } = new(1, null, null, Done: true);

    public IReadOnlyList<Finding> Inject(FaultOrder order)
    {
        _active.Add(new ActiveFault("f-1", order, Now, null, Scheduled: false));
        return [];
    }

    public IReadOnlyList<Finding> Clear(string id) =>
        _active.RemoveAll(fault => fault.Id == id) > 0 ? [] : [new Finding("unknown-fault", "id", "There is no such fault.", id, "List them.")];
}
