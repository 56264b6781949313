namespace LabWatch.Alerts.Hazards;

/// <summary>The channels that a runaway of the heater is judged by.</summary>
/// <param name="Thermometer">The thermometer that the source's temperature is taken from.</param>
/// <param name="Heater">The heater's power.</param>
/// <param name="SetPoint">The set point; null where it is not read.</param>
/// <param name="Ambient">Air of the room; null where it is not read.</param>
internal sealed record RunawayInputs(HazardChannel Thermometer, HazardChannel Heater, HazardChannel? SetPoint, HazardChannel? Ambient)
{
    /// <summary>Taken for the room where it is not read, degree Celsius.</summary>
    public const double UsualAmbientCelsius = 23;

    /// <summary>All of them.</summary>
    public IReadOnlyList<HazardChannel> All => [.. new[] { Thermometer, Heater, SetPoint, Ambient }.OfType<HazardChannel>()];
}
