using LabWatch.Metrology.Hazards;

namespace LabWatch.Lab.Sources;

/// <summary>What is known about touching a surface, for the burn threshold of ISO 13732-1.</summary>
/// <param name="Material">Material of the surface.</param>
/// <param name="ContactTime">Longest contact to reckon with; null where unknown (contact up to 10 minutes is then assumed).</param>
/// <param name="LaboratoryLimitCelsius">The laboratory's own limit, used where it is lower than the threshold; null where there is none.</param>
public sealed record SurfaceContact(SurfaceMaterial Material, TimeSpan? ContactTime, double? LaboratoryLimitCelsius)
{
    /// <summary>Temperature at and below which the surface counts as cold, degree Celsius, used where it is higher than the usual 0; null where there is none.</summary>
    public double? ColdLimitCelsius { get; init; }
}
