namespace LabWatch.Metrology.Radiometry;

/// <summary>A radiance temperature with its derivatives.</summary>
/// <param name="Kelvin">Temperature of the blackbody of equal radiance in the band, kelvin.</param>
/// <param name="PerSurfaceKelvin">Derivative by the temperature of the surface.</param>
/// <param name="PerEmissivity">Derivative by the emissivity, kelvin per unit.</param>
/// <param name="PerBackgroundKelvin">Derivative by the temperature of the surroundings.</param>
public readonly record struct RadianceTemperature(
    double Kelvin, double PerSurfaceKelvin, double PerEmissivity, double PerBackgroundKelvin);
