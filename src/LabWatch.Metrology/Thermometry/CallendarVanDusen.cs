namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Callendar-Van Dusen characteristic of an industrial platinum resistance thermometer, IEC 60751:2022, 4.2:
/// R(t) = R0 (1 + A t + B t^2 + C (t - 100 degC) t^3), the last term below 0 degC only.
/// The inverse is the closed form above 0 degC and Newton's method on the equation itself below (no approximate polynomial): within 1e-9 K.
/// </summary>
/// <param name="R0Ohm">Resistance at 0 degC, ohm, positive.</param>
/// <param name="A">Coefficient A, 1/degC, positive.</param>
/// <param name="B">Coefficient B, 1/degC^2.</param>
/// <param name="C">Coefficient C, 1/degC^4.</param>
public readonly record struct CallendarVanDusen(double R0Ohm, double A, double B, double C)
{
    /// <summary>Lowest temperature the equation is given for, degree Celsius.</summary>
    public const double MinimumCelsius = -200;

    /// <summary>Highest temperature the equation is given for, degree Celsius.</summary>
    public const double MaximumCelsius = 850;

    private const int MaximumSteps = 30;

    /// <summary>The nominal characteristic of IEC 60751:2022 for a resistance at 0 degC (100 ohm for a Pt100).</summary>
    public static CallendarVanDusen Nominal(double r0Ohm) => new(r0Ohm, 3.9083e-3, -5.775e-7, -4.183e-12);

    /// <summary>
    /// The characteristic given by the older alpha, delta, beta form:
    /// R(t) = R0 (1 + alpha (t - delta (t/100 - 1) t/100 - beta (t/100 - 1) (t/100)^3)), beta below 0 degC only.
    /// </summary>
    /// <param name="r0Ohm">Resistance at 0 degC, ohm.</param>
    /// <param name="alpha">1/degC.</param>
    /// <param name="delta">degC.</param>
    /// <param name="beta">degC.</param>
    public static CallendarVanDusen FromAlphaDeltaBeta(double r0Ohm, double alpha, double delta, double beta) =>
        new(r0Ohm, alpha * (1 + (delta / 100)), -1e-4 * alpha * delta, -1e-8 * alpha * beta);

    /// <summary>Mean temperature coefficient (R(100 degC) - R0) / (R0 100 degC) = A + 100 B, 1/degC.</summary>
    public double Alpha => A + (100 * B);

    /// <summary>Coefficient delta of the older form of the equation, -1e4 B / (A + 100 B), degC.</summary>
    public double Delta => -1e4 * B / Alpha;

    /// <summary>Coefficient beta of the older form of the equation, -1e8 C / (A + 100 B), degC.</summary>
    public double Beta => -1e8 * C / Alpha;

    /// <summary>Resistance at a temperature, ohm. No range is imposed: the caller judges it.</summary>
    public double ResistanceOhm(double celsius) => R0Ohm * Ratio(celsius);

    /// <summary>dR/dt at a temperature, ohm per kelvin.</summary>
    public double SlopeOhmPerKelvin(double celsius) => R0Ohm * RatioSlope(celsius);

    /// <summary>Temperature of a resistance, degree Celsius; NaN where the equation has no root on its rising branch.</summary>
    public double CelsiusOf(double resistanceOhm)
    {
        double excess = (resistanceOhm / R0Ohm) - 1;

        // The root in the form that loses no digits near 0 degC, and that stays right for B = 0.
        double quadratic = 2 * excess / (A + Math.Sqrt((A * A) + (4 * B * excess)));
        return excess >= 0 || !double.IsFinite(quadratic) ? quadratic : RootBelowZero(excess, quadratic);
    }

    /// <summary>
    /// Evaluates a resistance; in range from <see cref="MinimumCelsius"/> to <see cref="MaximumCelsius"/>.
    /// </summary>
    /// <param name="resistanceOhm">Resistance, ohm; NaN, zero and negative values mean no temperature.</param>
    /// <param name="standardUncertaintyKelvin">Standard uncertainty of the temperature, kelvin.</param>
    public TemperatureEvaluation Evaluate(double resistanceOhm, double standardUncertaintyKelvin)
    {
        double celsius = resistanceOhm > 0 ? CelsiusOf(resistanceOhm) : double.NaN;
        return TemperatureEvaluation.Of(
            celsius,
            standardUncertaintyKelvin,
            1 / SlopeOhmPerKelvin(celsius),
            celsius is >= MinimumCelsius and <= MaximumCelsius);
    }

    private double Ratio(double t) => 1 + (t * (A + (t * (B + (t < 0 ? C * t * (t - 100) : 0)))));

    private double RatioSlope(double t) => A + (t * ((2 * B) + (t < 0 ? C * t * ((4 * t) - 300) : 0)));

    private double RootBelowZero(double excess, double start)
    {
        double t = start;
        for (int step = 0; step < MaximumSteps; step++)
        {
            double change = (Ratio(t) - 1 - excess) / RatioSlope(t);
            t -= change;
            if (Math.Abs(change) <= 1e-12 * Math.Max(1, Math.Abs(t)))
            {
                return t;
            }
        }

        return double.NaN;
    }
}
