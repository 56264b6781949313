using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Radiometry;

/// <summary>
/// Planck's law of blackbody radiation at one wavelength in vacuum, L = c1L / (lambda^5 (exp(c2/(lambda T)) - 1)), with its inverse and
/// derivative. Wavelengths in micrometres, temperatures in kelvin, both positive; spectral radiance in W m^-2 sr^-1 um^-1.
/// Relative accuracy 1e-14 times c2/(lambda T), checked to 1e-12.
/// </summary>
public static class PlanckLaw
{
    /// <summary>c2 in um K.</summary>
    internal const double SecondMicrometre = RadiationConstants.Second * 1e6;

    /// <summary>c1L in W um^4 m^-2 sr^-1: with wavelengths in micrometres it gives spectral radiance per micrometre.</summary>
    internal const double FirstMicrometre = RadiationConstants.FirstOfRadiance * 1e24;

    /// <summary>Spectral radiance, W m^-2 sr^-1 um^-1; 0 at 0 K.</summary>
    public static double Radiance(double micrometre, double kelvin) =>
        FirstMicrometre / (Fifth(micrometre) * Elementary.ExpMinusOne(SecondMicrometre / (micrometre * kelvin)));

    /// <summary>dL/dT, W m^-2 sr^-1 um^-1 K^-1.</summary>
    public static double RadianceSlope(double micrometre, double kelvin)
    {
        double x = SecondMicrometre / (micrometre * kelvin);
        return FirstMicrometre / Fifth(micrometre) * (x / kelvin) / (Elementary.ExpMinusOne(x) * -Elementary.ExpMinusOne(-x));
    }

    /// <summary>Temperature of a spectral radiance, kelvin: the radiance temperature at the wavelength. NaN for a negative radiance.</summary>
    public static double Temperature(double micrometre, double radiance) =>
        radiance >= 0
            ? SecondMicrometre / (micrometre * Elementary.LogOnePlus(FirstMicrometre / (Fifth(micrometre) * radiance)))
            : double.NaN;

    /// <summary>Wien's approximation c1L / (lambda^5 exp(c2/(lambda T))), W m^-2 sr^-1 um^-1.</summary>
    public static double WienRadiance(double micrometre, double kelvin) =>
        FirstMicrometre / Fifth(micrometre) * Math.Exp(-SecondMicrometre / (micrometre * kelvin));

    /// <summary>Radiant exitance of a blackbody into the half space, sigma T^4, W m^-2 (Stefan-Boltzmann).</summary>
    public static double TotalExitance(double kelvin) => RadiationConstants.StefanBoltzmann * kelvin * kelvin * kelvin * kelvin;

    /// <summary>Wavelength of the largest spectral radiance by wavelength, micrometre (Wien's displacement law).</summary>
    public static double PeakMicrometre(double kelvin) => RadiationConstants.WienWavelength * 1e6 / kelvin;

    /// <summary>Frequency of the largest spectral radiance by frequency, hertz.</summary>
    public static double PeakHertz(double kelvin) => RadiationConstants.WienFrequency * kelvin;

    /// <summary>
    /// dT for a relative change of emissivity, without surroundings: (lambda T^2/c2) (1 - exp(-c2/(lambda T))), kelvin per unit of relative
    /// change; without the bracket by Wien's approximation. First order, for checks: corrections use the exact inverse.
    /// </summary>
    public static double EmissivitySensitivity(double micrometre, double kelvin, bool wien = false)
    {
        double x = SecondMicrometre / (micrometre * kelvin);
        return kelvin / x * (wien ? 1 : -Elementary.ExpMinusOne(-x));
    }

    private static double Fifth(double value) => value * value * (value * value) * value;
}
