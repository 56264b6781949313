namespace LabWatch.Lab.Instruments;

/// <summary>
/// Radiation thermometer by the planckian Sakuma-Hattori equation S = C / (exp(c2/(A T + B)) - 1), with the c2 = 0.014388 m K of the ITS-90.
/// </summary>
/// <param name="RawUnit">Unit of the signal, by its SenML name (A, V).</param>
/// <param name="ExpandedUncertaintyKelvin">Expanded uncertainty, kelvin.</param>
/// <param name="CoverageFactor">Coverage factor.</param>
/// <param name="AMicrometre">A, micrometre.</param>
/// <param name="BMicrometreKelvin">B, micrometre kelvin.</param>
/// <param name="C">C, in the unit of the signal.</param>
public sealed record SakumaHattoriCharacteristic(
    string RawUnit, double ExpandedUncertaintyKelvin, double CoverageFactor, double AMicrometre, double BMicrometreKelvin, double C)
    : Characteristic(RawUnit, ExpandedUncertaintyKelvin, CoverageFactor);
