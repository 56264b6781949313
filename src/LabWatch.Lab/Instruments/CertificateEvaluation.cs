using System.Diagnostics;
using LabWatch.Metrology.Thermometry;

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
    public static TemperatureEvaluation Evaluate(Certificate certificate, double rawValue, string rawUnit)
    {
        ArgumentNullException.ThrowIfNull(certificate);
        return string.Equals(rawUnit, certificate.Characteristic.RawUnit, StringComparison.Ordinal)
            ? Evaluate(certificate, rawValue)
            : TemperatureEvaluation.None;
    }

    /// <summary>
    /// Evaluates a raw value that is known to be in the certificate's <see cref="Characteristic.RawUnit"/>. Outside the range of the
    /// certificate or of the characteristic the value is flagged and carries no uncertainty.
    /// </summary>
    /// <param name="certificate">Certificate in force.</param>
    /// <param name="rawValue">Raw value; NaN gives no temperature.</param>
    public static TemperatureEvaluation Evaluate(Certificate certificate, double rawValue)
    {
        ArgumentNullException.ThrowIfNull(certificate);
        Characteristic characteristic = certificate.Characteristic;
        double u = characteristic.ExpandedUncertaintyKelvin / characteristic.CoverageFactor;
        TemperatureEvaluation evaluation = characteristic switch
        {
            CallendarVanDusenCharacteristic c => new CallendarVanDusen(c.R0Ohm, c.A, c.B, c.C).Evaluate(rawValue, u),
            CorrectionTableCharacteristic c => new CorrectionTable(c.Points).Evaluate(rawValue, u),
            _ => throw new UnreachableException($"No evaluation of {characteristic.GetType().Name}."),
        };
        return evaluation.Within(certificate.MinimumCelsius, certificate.MaximumCelsius);
    }
}
