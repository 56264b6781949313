using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Reference functions of the ITS-90 for platinum resistance thermometers, both ways: Preston-Thomas 1990, Metrologia 27, 3-10 and 107,
/// equations 9a, 9b, 10a, 10b. Wr is the reference ratio R(T90)/R(273.16 K); temperatures in kelvin. The inverse takes the published
/// approximation (0.1 mK) and one step of Newton's method on the equation itself: within 1e-9 K. The published coefficients of 9a leave
/// Wr(273.16 K) short of 1 by 1e-8 (2.5 uK), those of 10a by 5e-9: 10a applies from the triple point of water on.
/// </summary>
public static class Its90
{
    /// <summary>Triple point of water, kelvin.</summary>
    public const double TriplePointKelvin = 273.16;

    /// <summary>Kelvin minus degree Celsius.</summary>
    public const double CelsiusOffset = 273.15;

    /// <summary>What equation 9a gives at 273.16 K.</summary>
    private const double LowRatioAtTriplePoint = 0.99999999;

    /// <summary>Wr at a temperature, 13.8033 K to 1234.93 K.</summary>
    public static double Ratio(double kelvin) => kelvin < TriplePointKelvin ? RatioLow(kelvin) : RatioHigh(kelvin);

    /// <summary>dWr/dT, 1/K.</summary>
    public static double RatioSlope(double kelvin) => kelvin < TriplePointKelvin ? RatioSlopeLow(kelvin) : RatioSlopeHigh(kelvin);

    /// <summary>T90 of a reference ratio, kelvin; NaN for a ratio that is not positive.</summary>
    public static double Kelvin(double ratio) => ratio < LowRatioAtTriplePoint ? KelvinLow(ratio) : KelvinHigh(ratio);

    /// <summary>Equation 9a, 13.8033 K to 273.16 K.</summary>
    public static double RatioLow(double kelvin) => Math.Exp(Polynomial.Value(Its90Coefficients.LowRatio, LowPlace(kelvin)));

    /// <summary>Derivative of equation 9a, 1/K.</summary>
    public static double RatioSlopeLow(double kelvin) =>
        RatioLow(kelvin) * Polynomial.Slope(Its90Coefficients.LowRatio, LowPlace(kelvin)) / (1.5 * kelvin);

    /// <summary>Equation 10a, 273.15 K to 1234.93 K.</summary>
    public static double RatioHigh(double kelvin) => Polynomial.Value(Its90Coefficients.HighRatio, (kelvin - 754.15) / 481);

    /// <summary>Derivative of equation 10a, 1/K.</summary>
    public static double RatioSlopeHigh(double kelvin) => Polynomial.Slope(Its90Coefficients.HighRatio, (kelvin - 754.15) / 481) / 481;

    /// <summary>Equation 9b: inverse of 9a, within 0.1 mK.</summary>
    public static double ApproximateKelvinLow(double ratio) =>
        TriplePointKelvin * Polynomial.Value(Its90Coefficients.LowTemperature, (Math.Cbrt(Math.Sqrt(ratio)) - 0.65) / 0.35);

    /// <summary>Equation 10b: inverse of 10a, within 0.13 mK.</summary>
    public static double ApproximateKelvinHigh(double ratio) =>
        CelsiusOffset + Polynomial.Value(Its90Coefficients.HighTemperature, (ratio - 2.64) / 1.64);

    /// <summary>Exact inverse of 9a, kelvin.</summary>
    public static double KelvinLow(double ratio)
    {
        double kelvin = ApproximateKelvinLow(ratio);
        return kelvin - LowStep(ratio, kelvin);
    }

    /// <summary>Exact inverse of 10a, kelvin.</summary>
    public static double KelvinHigh(double ratio)
    {
        double kelvin = ApproximateKelvinHigh(ratio);
        return kelvin - ((RatioHigh(kelvin) - ratio) / RatioSlopeHigh(kelvin));
    }

    /// <summary>A step on ln Wr against T, which shares the polynomial between value and slope.</summary>
    private static double LowStep(double ratio, double kelvin)
    {
        double place = LowPlace(kelvin);
        double logRatio = Polynomial.Value(Its90Coefficients.LowRatio, place);
        double slope = Polynomial.Slope(Its90Coefficients.LowRatio, place) / (1.5 * kelvin);
        return -Elementary.LogOnePlus((ratio / Math.Exp(logRatio)) - 1) / slope;
    }

    private static double LowPlace(double kelvin) => (Math.Log(kelvin / TriplePointKelvin) + 1.5) / 1.5;
}
