namespace LabWatch.Simulator.Sources;

/// <summary>Dimensions of a simulated cavity.</summary>
/// <param name="RadiusMillimetre">Inner radius.</param>
/// <param name="LengthMillimetre">Aperture plane to the bottom.</param>
/// <param name="ApertureRadiusMillimetre">Radius of the opening.</param>
/// <param name="ConeHalfAngleDegree">Half-angle of a conical bottom; null for a flat one.</param>
internal sealed record CavityDesign(double RadiusMillimetre, double LengthMillimetre, double ApertureRadiusMillimetre, double? ConeHalfAngleDegree);
