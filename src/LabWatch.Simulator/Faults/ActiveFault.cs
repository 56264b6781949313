using LabWatch.Lab.Time;

namespace LabWatch.Simulator.Faults;

/// <summary>A fault that a source has, had or will have.</summary>
/// <param name="Id">Id in the simulation, a slug.</param>
/// <param name="Order">What was ordered.</param>
/// <param name="Start">First instant at which it works.</param>
/// <param name="End">First instant at which it is repaired; null while no repair is planned.</param>
/// <param name="Scheduled">Whether the schedule of the demo made it; false for a command.</param>
public sealed record ActiveFault(string Id, FaultOrder Order, Instant Start, Instant? End, bool Scheduled)
{
    /// <summary>Whether it works at an instant.</summary>
    public bool Covers(Instant at) => at >= Start && (End is not { } end || at < end);

    /// <summary>Size at an instant, grown over the onset; zero outside its time.</summary>
    internal double MagnitudeAt(Instant at)
    {
        if (!Covers(at))
        {
            return 0;
        }

        double size = Order.Size ?? FaultCatalogue.Of(Order.Kind).Default;
        double onset = Order.Onset.TotalSeconds;
        return onset <= 0 ? size : size * Math.Min(1, (at - Start).TotalSeconds / onset);
    }
}
