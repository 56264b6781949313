using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Simulator.Faults;

namespace LabWatch.Simulator;

/// <summary>Commands to a running simulation. Safe for use by several threads.</summary>
public interface ILabSimulation
{
    /// <summary>The simulated moment that has been reached.</summary>
    Instant Now { get; }

    /// <summary>The faults that work now or are still to come, scheduled ones among them while they work.</summary>
    IReadOnlyList<ActiveFault> ActiveFaults { get; }

    /// <summary>Makes something go wrong from the next second on. Findings where the order cannot be done, else an empty list.</summary>
    IReadOnlyList<Finding> Inject(FaultOrder order);

    /// <summary>Repairs a commanded fault from the next second on, by the id in <see cref="ActiveFaults"/>. Findings where there is none of that id.</summary>
    IReadOnlyList<Finding> Clear(string id);
}
