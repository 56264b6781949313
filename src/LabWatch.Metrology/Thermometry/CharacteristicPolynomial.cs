namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// A characteristic given as a polynomial: t90 = c0 + c1 x + c2 x^2 + ..., x the raw value (common practice, no source). Outside the range of x
/// a polynomial means nothing: no temperature.
/// </summary>
/// <param name="Coefficients">Coefficients, lowest power first, degree Celsius; at least one.</param>
/// <param name="Minimum">Lowest raw value it is given for.</param>
/// <param name="Maximum">Highest raw value it is given for.</param>
public readonly record struct CharacteristicPolynomial(IReadOnlyList<double> Coefficients, double Minimum, double Maximum)
{
    /// <summary>Evaluates a raw value.</summary>
    /// <param name="raw">Raw value.</param>
    /// <param name="standardUncertaintyKelvin">Standard uncertainty of the temperature, kelvin.</param>
    public TemperatureEvaluation Evaluate(double raw, double standardUncertaintyKelvin)
    {
        if (!(raw >= Minimum && raw <= Maximum))
        {
            return TemperatureEvaluation.None;
        }

        double value = 0;
        double slope = 0;
        for (int i = Coefficients.Count - 1; i >= 0; i--)
        {
            slope = (slope * raw) + value;
            value = (value * raw) + Coefficients[i];
        }

        return TemperatureEvaluation.Of(value, standardUncertaintyKelvin, slope, inRange: true);
    }
}
