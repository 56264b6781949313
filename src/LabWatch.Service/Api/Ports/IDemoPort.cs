using LabWatch.Lab.Findings;
using LabWatch.Service.Api.Demo;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Ports;

/// <summary>What the demo offers beyond the service: history that fills, faults to inject. Registered in the demo only.</summary>
internal interface IDemoPort
{
    /// <summary>How far the history is; null when it is there.</summary>
    DemoProgressView? Progress { get; }

    /// <summary>The kinds of fault and the faults in force.</summary>
    FaultListView Faults();

    /// <summary>Injects a fault; the findings are empty where it is in force now.</summary>
    IReadOnlyList<Finding> Inject(FaultRequest request);

    /// <summary>Clears a fault; the findings are empty where that is done.</summary>
    IReadOnlyList<Finding> Clear(string id);
}
