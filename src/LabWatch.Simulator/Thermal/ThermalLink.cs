namespace LabWatch.Simulator.Thermal;

/// <summary>A way for heat between two nodes.</summary>
/// <param name="A">Index of one end.</param>
/// <param name="B">Index of the other end.</param>
/// <param name="Strength">W/K for a conductive link, W/K^4 for a radiative one.</param>
internal readonly record struct ThermalLink(int A, int B, double Strength);
