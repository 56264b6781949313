namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// A standard platinum resistance thermometer on the ITS-90: its resistance at the triple point of water, as in force, and its deviation
/// functions below and above it; at least one of them.
/// </summary>
/// <param name="TriplePointOhm">R(273.16 K) from the latest check on the same bridge, ohm, positive; NaN means no temperature.</param>
/// <param name="Below">Deviation function used for W up to 1; where null, the other one is.</param>
/// <param name="Above">Deviation function used for W above 1; where null, the other one is.</param>
public readonly record struct Sprt(double TriplePointOhm, SprtDeviation? Below, SprtDeviation? Above)
{
    /// <summary>How far beyond the end of a subrange a value still counts as inside, kelvin: the noise of a measurement at the fixed point there.</summary>
    public const double EndToleranceKelvin = 0.01;

    /// <summary>Resistance at a temperature (degree Celsius), ohm.</summary>
    public double ResistanceOhm(double celsius)
    {
        double kelvin = celsius + Its90.CelsiusOffset;
        return TriplePointOhm * DeviationFor(kelvin <= Its90.TriplePointKelvin ? 0 : 2).RatioAt(kelvin);
    }

    /// <summary>Evaluates a resistance (at zero power or at the current of the calibration); in range inside the subrange that applies.</summary>
    /// <param name="resistanceOhm">Resistance, ohm; zero, negative and NaN mean no temperature.</param>
    /// <param name="standardUncertaintyKelvin">Standard uncertainty of the temperature, kelvin.</param>
    public TemperatureEvaluation Evaluate(double resistanceOhm, double standardUncertaintyKelvin)
    {
        double ratio = resistanceOhm / TriplePointOhm;
        if (!(ratio > 0))
        {
            return TemperatureEvaluation.None;
        }

        SprtDeviation deviation = DeviationFor(ratio);
        double kelvin = Its90.Kelvin(ratio - deviation.Value(ratio));
        return TemperatureEvaluation.Of(
            kelvin - Its90.CelsiusOffset,
            standardUncertaintyKelvin,
            KelvinPerRatio(ratio, deviation, kelvin) / TriplePointOhm,
            kelvin >= deviation.MinimumKelvin - EndToleranceKelvin && kelvin <= deviation.MaximumKelvin + EndToleranceKelvin);
    }

    /// <summary>dT/dR(TPW) at constant resistance, kelvin per ohm: how an error of the triple-point resistance carries over.</summary>
    public double SensitivityToTriplePoint(double resistanceOhm)
    {
        double ratio = resistanceOhm / TriplePointOhm;
        SprtDeviation deviation = DeviationFor(ratio);
        return -ratio / TriplePointOhm * KelvinPerRatio(ratio, deviation, Its90.Kelvin(ratio - deviation.Value(ratio)));
    }

    private static double KelvinPerRatio(double ratio, SprtDeviation deviation, double kelvin) => (1 - deviation.Slope(ratio)) / Its90.RatioSlope(kelvin);

    private SprtDeviation DeviationFor(double ratio) => (ratio <= 1 ? Below ?? Above : Above ?? Below)!;
}
