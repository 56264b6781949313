using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Sources;

/// <summary>Where the temperature of a thermocouple's reference junctions comes from: another channel of the source, or an estimate that stands.</summary>
/// <param name="Channel">Id of the channel that measures it; null where it is kept at an estimate.</param>
/// <param name="Celsius">
/// The estimate, degree Celsius, with its standard uncertainty. With a channel, what the junctions differ from its thermometer: a difference in kelvin.
/// </param>
public sealed record ReferenceJunction(string? Channel, Estimate Celsius);
