using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Profiles;

/// <summary>A calibrated thermometer in a well, over a window.</summary>
/// <param name="Channel">The channel.</param>
/// <param name="PositionMillimetre">Distance of the sensing element from the aperture plane.</param>
/// <param name="Celsius">Mean t90.</param>
/// <param name="CalibrationKelvin">Standard uncertainty by its certificate.</param>
/// <param name="NoiseKelvin">Standard error of the mean, with <see cref="BatchMeans.Parts"/> - 1 degrees of freedom.</param>
/// <param name="Certificate">The certificate, as <c>id@revision</c>.</param>
public sealed record WellPoint(
    Channel Channel, double PositionMillimetre, double Celsius, double CalibrationKelvin, double NoiseKelvin, string Certificate)
{
    /// <summary>Standard uncertainty of the mean, kelvin.</summary>
    public double StandardUncertainty => double.Hypot(CalibrationKelvin, NoiseKelvin);
}
