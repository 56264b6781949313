using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>What the demo can break, and what it has broken.</summary>
internal sealed record FaultListView(
    [property: Description("The kinds of fault.")] IReadOnlyList<FaultKindView> Kinds,
    [property: Description("The faults in force.")] IReadOnlyList<ActiveFaultView> Active);
