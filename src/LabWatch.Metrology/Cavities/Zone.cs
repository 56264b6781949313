namespace LabWatch.Metrology.Cavities;

/// <summary>A zone of the wall: its surface and its place in units of the cavity's radius, the rim of the bottom at z = 0.</summary>
/// <param name="Surface">The surface it lies on.</param>
/// <param name="R">Distance from the axis.</param>
/// <param name="Z">Height above the rim of the bottom.</param>
public readonly record struct Zone(CavitySurface Surface, double R, double Z);
