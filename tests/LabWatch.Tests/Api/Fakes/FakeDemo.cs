using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Demo;
using LabWatch.Service.Api.Ports;
using LabWatch.Service.Api.Views;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>A demo that only remembers what was asked of it.</summary>
internal sealed class FakeDemo(TimeProvider clock) : IDemoPort
{
    private readonly List<ActiveFaultView> _active = [];

    public DemoProgressView? Progress { get; set; }

    public FaultListView Faults() => new(
        [
            new FaultKindView("insulation-damage", "A thermal bridge leads from the hot part to the outer case.", "W/K", 0, 20, 2, false),
            new FaultKindView("thermometer-drift", "A thermometer's error grows.", "K", -50, 50, 0.1, true),
        ],
        [.. _active]);

    public IReadOnlyList<Finding> Inject(FaultRequest request)
    {
        if (request.Kind is null)
        {
            return [new Finding("missing", "/kind", "The kind is missing.", null, "Name a kind.")];
        }

        _active.Add(new ActiveFaultView("f-1", request.Kind, request.Source ?? string.Empty, request.Channel, request.Size, Instant.Now(clock), null, false));
        return [];
    }

    public IReadOnlyList<Finding> Clear(string id) =>
        _active.RemoveAll(fault => fault.Id == id) > 0 ? [] : [new Finding("unknown-fault", "id", "There is no such fault.", id, "List them.")];
}
