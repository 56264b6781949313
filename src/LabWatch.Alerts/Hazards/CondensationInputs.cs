namespace LabWatch.Alerts.Hazards;

/// <summary>The channels that condensation is judged by.</summary>
/// <param name="Walls">Thermometers of the walls, the lip among them; at least one.</param>
/// <param name="DewPoint">Dew or frost point at the aperture; null without a sensor there.</param>
/// <param name="Ambient">Air of the room.</param>
/// <param name="Humidity">Relative humidity of the room.</param>
/// <param name="PurgeFlow">Flow of purge gas; null where there is none.</param>
/// <param name="QualifiedFlow">Flow that keeps the room's air out, litre per minute; NaN where none was qualified.</param>
internal sealed record CondensationInputs(
    IReadOnlyList<HazardChannel> Walls, HazardChannel? DewPoint, HazardChannel? Ambient, HazardChannel? Humidity, HazardChannel? PurgeFlow, double QualifiedFlow)
{
    /// <summary>The channel that it is told about.</summary>
    public HazardChannel Subject => DewPoint ?? Humidity!;

    /// <summary>All of them.</summary>
    public IReadOnlyList<HazardChannel> All =>
        [.. Walls, .. new[] { DewPoint, Ambient, Humidity, PurgeFlow }.OfType<HazardChannel>()];
}
