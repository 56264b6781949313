using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Profiles;

/// <summary>What the cavity reflects, over a window.</summary>
/// <param name="AirCelsius">Air temperature.</param>
/// <param name="RadianceCelsius">Radiance temperature of the surroundings: air and the offset that the lab file states.</param>
/// <param name="IsMeasured">Whether the air was measured; else 23 degC is taken with a standard uncertainty of 3 K.</param>
public sealed record SurroundingsPoint(double AirCelsius, Estimate RadianceCelsius, bool IsMeasured)
{
    /// <summary>Taken for the air where nothing measures it, degree Celsius.</summary>
    public const double UsualCelsius = 23;

    /// <summary>Standard uncertainty of that, kelvin.</summary>
    public const double UsualUncertaintyKelvin = 3;

    /// <summary>Standard uncertainty of an air thermometer without a certificate, kelvin.</summary>
    public const double UncalibratedKelvin = 0.5;
}
