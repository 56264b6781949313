namespace LabWatch.Lab.Instruments;

/// <summary>
/// Industrial platinum resistance thermometer: R(t) = R0 (1 + A t + B t^2 + C (t - 100 degC) t^3), the last term below 0 degC only
/// (Callendar-Van Dusen, IEC 60751:2022).
/// </summary>
/// <param name="ExpandedUncertaintyKelvin">Expanded uncertainty, kelvin.</param>
/// <param name="CoverageFactor">Coverage factor.</param>
/// <param name="R0Ohm">Resistance at 0 degC, ohm.</param>
/// <param name="A">Coefficient A, 1/degC.</param>
/// <param name="B">Coefficient B, 1/degC^2.</param>
/// <param name="C">Coefficient C, 1/degC^4.</param>
public sealed record CallendarVanDusenCharacteristic(
    double ExpandedUncertaintyKelvin, double CoverageFactor, double R0Ohm, double A, double B, double C)
    : Characteristic("Ohm", ExpandedUncertaintyKelvin, CoverageFactor);
