using LabWatch.Lab.Identity;
using LabWatch.Service.Api.Views;
using LabWatch.Simulator;
using LabWatch.Simulator.Faults;

namespace LabWatch.Service.Api.Demo;

/// <summary>Faults of the simulated laboratory, as the API shows them.</summary>
internal static class FaultViews
{
    /// <summary>All kinds, and the faults that work now or are still to come.</summary>
    public static FaultListView Of(ILabSimulation simulation, string site) => new(
        [.. FaultCatalogue.All.Select(Of)],
        [.. simulation.ActiveFaults.Select(fault => Of(fault, site))]);

    private static FaultKindView Of(FaultTraits traits) => new(
        traits.Name, FaultTexts.Of(traits.Kind), traits.Unit, traits.Minimum, traits.Maximum, traits.Default, traits.NeedsChannel);

    private static ActiveFaultView Of(ActiveFault fault, string site) => new(
        fault.Id,
        FaultCatalogue.Of(fault.Order.Kind).Name,
        new SourceKey(site, fault.Order.Source).ToString(),
        fault.Order.Channel,
        fault.Order.Size,
        fault.Start,
        fault.End,
        fault.Scheduled);
}
