using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Radiometry;

/// <summary>
/// t90 above the silver point by the ratio of spectral radiances to a fixed point (Ag, Au or Cu), with c2 = 0.014388 m K:
/// Preston-Thomas 1990, Metrologia 27, 3-10, equation 15. Wavelength in vacuum, micrometre; temperatures in kelvin.
/// </summary>
public static class Its90Radiation
{
    private const double SecondMicrometre = RadiationConstants.SecondOfIts90 * 1e6;

    /// <summary>L(T90) / L(T90(X)).</summary>
    public static double Ratio(double micrometre, double kelvin, double referenceKelvin) =>
        Elementary.ExpMinusOne(SecondMicrometre / (micrometre * referenceKelvin)) / Elementary.ExpMinusOne(SecondMicrometre / (micrometre * kelvin));

    /// <summary>T90 of a ratio, kelvin; NaN for a ratio that is not positive.</summary>
    public static double Temperature(double micrometre, double ratio, double referenceKelvin) =>
        ratio > 0
            ? SecondMicrometre / (micrometre * Elementary.LogOnePlus(Elementary.ExpMinusOne(SecondMicrometre / (micrometre * referenceKelvin)) / ratio))
            : double.NaN;

    /// <summary>u(T90) from the standard uncertainty of the fixed point's temperature alone, by Wien's approximation: (T/T_X)^2 u(T_X), kelvin.</summary>
    public static double UncertaintyOfReference(double kelvin, double referenceKelvin, double referenceStandardUncertainty) =>
        kelvin / referenceKelvin * (kelvin / referenceKelvin) * referenceStandardUncertainty;
}
