namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// A thermocouple with the deviation from its reference function that a certificate states: E(t) = E_ref(t) + D(t), D(t) a polynomial without
/// a constant term (both junctions at one temperature give no emf). What is measured is E(t) - E(t_ref): emfs add, temperatures do not.
/// </summary>
/// <param name="Type">The type.</param>
/// <param name="DeviationMillivolt">Coefficients of t, t^2, ... of D(t), millivolt; empty for none.</param>
public readonly record struct Thermocouple(ThermocoupleType Type, IReadOnlyList<double> DeviationMillivolt)
{
    private const int MaximumSteps = 20;

    /// <summary>Emf of the hot junction against 0 degC, millivolt.</summary>
    public double EmfMillivolt(double celsius) => ThermocoupleReference.Of(Type).EmfMillivolt(celsius) + Deviation(celsius);

    /// <summary>Seebeck coefficient of this thermocouple, millivolt per kelvin.</summary>
    public double SlopeMillivoltPerKelvin(double celsius) => ThermocoupleReference.Of(Type).SlopeMillivoltPerKelvin(celsius) + DeviationSlope(celsius);

    /// <summary>Temperature of the hot junction, degree Celsius; NaN outside the type's range.</summary>
    /// <param name="measuredMillivolt">Emf measured between the reference junctions, millivolt.</param>
    /// <param name="referenceJunctionCelsius">Temperature of the reference junctions (cold junction), degree Celsius.</param>
    public double CelsiusOf(double measuredMillivolt, double referenceJunctionCelsius)
    {
        ThermocoupleReference reference = ThermocoupleReference.Of(Type);
        double emf = measuredMillivolt + EmfMillivolt(referenceJunctionCelsius);
        double t = reference.CelsiusOf(emf);
        if (DeviationMillivolt.Count == 0 || double.IsNaN(t))
        {
            return t;
        }

        for (int step = 0; step < MaximumSteps; step++)
        {
            double change = (EmfMillivolt(t) - emf) / SlopeMillivoltPerKelvin(t);
            t -= change;
            if (Math.Abs(change) < 1e-10)
            {
                return t >= reference.MinimumInvertibleCelsius && t <= reference.MaximumCelsius ? t : double.NaN;
            }
        }

        return double.NaN;
    }

    /// <summary>Evaluates a measured emf; the certificate sets the range.</summary>
    /// <param name="measuredMillivolt">Emf measured, millivolt.</param>
    /// <param name="referenceJunctionCelsius">Temperature of the reference junctions, degree Celsius; NaN means no temperature.</param>
    /// <param name="standardUncertaintyKelvin">Standard uncertainty of the temperature, kelvin.</param>
    public TemperatureEvaluation Evaluate(double measuredMillivolt, double referenceJunctionCelsius, double standardUncertaintyKelvin)
    {
        double celsius = CelsiusOf(measuredMillivolt, referenceJunctionCelsius);
        return TemperatureEvaluation.Of(celsius, standardUncertaintyKelvin, 1 / SlopeMillivoltPerKelvin(celsius), inRange: true);
    }

    private double Deviation(double celsius)
    {
        double sum = 0;
        for (int i = DeviationMillivolt.Count - 1; i >= 0; i--)
        {
            sum = (sum + DeviationMillivolt[i]) * celsius;
        }

        return sum;
    }

    private double DeviationSlope(double celsius)
    {
        double sum = 0;
        for (int i = DeviationMillivolt.Count - 1; i >= 0; i--)
        {
            sum = (sum * celsius) + ((i + 1) * DeviationMillivolt[i]);
        }

        return sum;
    }
}
