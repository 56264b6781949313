using LabWatch.Metrology.Numerics;
using LabWatch.Metrology.Radiometry;

namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Planckian Sakuma-Hattori equation of a radiation thermometer: S(T) = C / (exp(c2/(A T + B)) - 1), T in kelvin (F. Sakuma and S. Hattori 1982;
/// P. Saunders, CCT-WG5 2008; ASTM E2847).
/// </summary>
/// <param name="AMicrometre">A, micrometre, positive: near the mean effective wavelength.</param>
/// <param name="BMicrometreKelvin">B, micrometre kelvin.</param>
/// <param name="C">C, in the unit of the signal, positive.</param>
/// <param name="SecondRadiationConstant">
/// c2 in m K that the parameters were found with: <see cref="RadiationConstants.SecondOfIts90"/> where t90 above the silver point is meant.
/// </param>
public readonly record struct SakumaHattori(
    double AMicrometre, double BMicrometreKelvin, double C, double SecondRadiationConstant = RadiationConstants.SecondOfIts90)
{
    private double SecondMicrometre => SecondRadiationConstant * 1e6;

    /// <summary>
    /// A and B of a band of uniform response: A = l (1 - 6 s^2/l^2), B = c2 s^2/(2 l^2), with l the middle of the band and s its standard
    /// deviation, width / (2 sqrt 3) (Saunders 2008).
    /// </summary>
    public static SakumaHattori OfBand(
        double lowerMicrometre, double upperMicrometre, double c, double secondRadiationConstant = RadiationConstants.SecondOfIts90)
    {
        double middle = 0.5 * (lowerMicrometre + upperMicrometre);
        double width = (upperMicrometre - lowerMicrometre) / middle;
        double relativeVariance = width * width / 12;
        return new(middle * (1 - (6 * relativeVariance)), secondRadiationConstant * 1e6 * relativeVariance / 2, c, secondRadiationConstant);
    }

    /// <summary>Signal at a temperature (kelvin), in the unit of C.</summary>
    public double Signal(double kelvin) => C / Elementary.ExpMinusOne(SecondMicrometre / ((AMicrometre * kelvin) + BMicrometreKelvin));

    /// <summary>dS/dT at a temperature (kelvin), unit of C per kelvin.</summary>
    public double SignalSlope(double kelvin)
    {
        double place = (AMicrometre * kelvin) + BMicrometreKelvin;
        double x = SecondMicrometre / place;
        return C * x * AMicrometre / (place * Elementary.ExpMinusOne(x) * -Elementary.ExpMinusOne(-x));
    }

    /// <summary>Temperature of a signal, kelvin; NaN where the signal is not positive.</summary>
    public double Kelvin(double signal) =>
        signal > 0 ? ((SecondMicrometre / Elementary.LogOnePlus(C / signal)) - BMicrometreKelvin) / AMicrometre : double.NaN;

    /// <summary>Evaluates a signal; in range wherever it means a temperature above 0 K: the certificate sets the range.</summary>
    /// <param name="signal">Signal in the unit of C.</param>
    /// <param name="standardUncertaintyKelvin">Standard uncertainty of the temperature, kelvin.</param>
    public TemperatureEvaluation Evaluate(double signal, double standardUncertaintyKelvin)
    {
        double kelvin = Kelvin(signal);
        return kelvin > 0 && double.IsFinite(kelvin)
            ? TemperatureEvaluation.Of(kelvin - 273.15, standardUncertaintyKelvin, 1 / SignalSlope(kelvin), inRange: true)
            : TemperatureEvaluation.None;
    }
}
