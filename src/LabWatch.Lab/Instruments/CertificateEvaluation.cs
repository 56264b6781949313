using System.Diagnostics;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Instruments;

/// <summary>The one way from a raw reading to t90: through the certificate in force at the reading's time. Pure, free of allocation.</summary>
public static class CertificateEvaluation
{
    /// <summary>
    /// Evaluates a raw value in the unit it came in. A unit other than the certificate's gives no temperature
    /// (a wrong number would be worse than none); the lab file's validation says how to cure it.
    /// </summary>
    /// <param name="certificate">Certificate in force.</param>
    /// <param name="rawValue">Raw value as received; NaN gives no temperature.</param>
    /// <param name="rawUnit">SenML name of its unit.</param>
    /// <param name="conditions">What else is known at the reading's time.</param>
    public static TemperatureEvaluation Evaluate(
        Certificate certificate, double rawValue, string rawUnit, EvaluationConditions conditions = default)
    {
        ArgumentNullException.ThrowIfNull(certificate);
        return string.Equals(rawUnit, certificate.Characteristic.RawUnit, StringComparison.Ordinal)
            ? Evaluate(certificate, rawValue, conditions)
            : TemperatureEvaluation.None;
    }

    /// <summary>
    /// Evaluates a raw value that is known to be in the certificate's <see cref="Characteristic.RawUnit"/>. Outside the range of the
    /// certificate or of the characteristic the value is flagged and carries no uncertainty.
    /// </summary>
    /// <param name="certificate">Certificate in force.</param>
    /// <param name="rawValue">Raw value; NaN gives no temperature.</param>
    /// <param name="conditions">What else is known at the reading's time.</param>
    public static TemperatureEvaluation Evaluate(Certificate certificate, double rawValue, EvaluationConditions conditions = default)
    {
        ArgumentNullException.ThrowIfNull(certificate);
        Characteristic characteristic = certificate.Characteristic;
        double u = characteristic.ExpandedUncertaintyKelvin / characteristic.CoverageFactor;
        TemperatureEvaluation evaluation = characteristic switch
        {
            CallendarVanDusenCharacteristic c => new CallendarVanDusen(c.R0Ohm, c.A, c.B, c.C).Evaluate(rawValue, u),
            CorrectionTableCharacteristic c => new CorrectionTable(c.Points).Evaluate(rawValue, u),
            SprtCharacteristic c => Evaluate(c, rawValue, conditions.TriplePointOhm ?? InForce(certificate, c), u),
            ThermocoupleCharacteristic c => Evaluate(c, rawValue, conditions.ReferenceJunctionCelsius ?? Kept(c), u),
            PolynomialCharacteristic c => new CharacteristicPolynomial(c.Coefficients, c.RawMinimum, c.RawMaximum).Evaluate(rawValue, u),
            SakumaHattoriCharacteristic c => new SakumaHattori(c.AMicrometre, c.BMicrometreKelvin, c.C).Evaluate(rawValue, u),
            _ => throw new UnreachableException($"No evaluation of {characteristic.GetType().Name}."),
        };
        return evaluation.Within(certificate.MinimumCelsius, certificate.MaximumCelsius);
    }

    private static Estimate InForce(Certificate certificate, SprtCharacteristic characteristic) =>
        certificate.TriplePoint?.TriplePointOhm ?? new Estimate(characteristic.TriplePointOhm, 0);

    private static Estimate Kept(ThermocoupleCharacteristic characteristic) =>
        characteristic.ReferenceJunctionCelsius is { } celsius ? new(celsius, 0) : Estimate.None;

    private static TemperatureEvaluation Evaluate(SprtCharacteristic characteristic, double ohm, Estimate triplePoint, double u)
    {
        Sprt sprt = new(triplePoint.Value, characteristic.Below, characteristic.Above);
        return triplePoint.StandardUncertainty == 0
            ? sprt.Evaluate(ohm, u)
            : sprt.Evaluate(ohm, double.Hypot(u, sprt.SensitivityToTriplePoint(ohm) * triplePoint.StandardUncertainty));
    }

    private static TemperatureEvaluation Evaluate(ThermocoupleCharacteristic characteristic, double millivolt, Estimate junction, double u)
    {
        Thermocouple thermocouple = new(characteristic.Type, characteristic.DeviationMillivolt);
        TemperatureEvaluation evaluation = thermocouple.Evaluate(millivolt, junction.Value, u);
        return junction.StandardUncertainty > 0 && evaluation.HasValue
            ? TemperatureEvaluation.Of(
                evaluation.Celsius.Value,
                double.Hypot(u, thermocouple.SlopeMillivoltPerKelvin(junction.Value) * evaluation.Sensitivity * junction.StandardUncertainty),
                evaluation.Sensitivity,
                evaluation.InRange)
            : evaluation;
    }
}
