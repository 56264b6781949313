namespace LabWatch.Simulator.Faults;

/// <summary>What a kind of fault takes.</summary>
/// <param name="Kind">The kind.</param>
/// <param name="Name">Its name in commands, a slug.</param>
/// <param name="Unit">Unit of its size; 1 for a plain number.</param>
/// <param name="Minimum">Smallest size.</param>
/// <param name="Maximum">Largest size.</param>
/// <param name="Default">Size where an order gives none.</param>
/// <param name="NeedsChannel">Whether an order must name the channel.</param>
public sealed record FaultTraits(FaultKind Kind, string Name, string Unit, double Minimum, double Maximum, double Default, bool NeedsChannel);
