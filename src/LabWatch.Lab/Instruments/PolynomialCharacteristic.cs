namespace LabWatch.Lab.Instruments;

/// <summary>A characteristic given as a polynomial of the raw value: t90 = c0 + c1 x + c2 x^2 + ...</summary>
/// <param name="RawUnit">Unit of the raw value, by its SenML name.</param>
/// <param name="ExpandedUncertaintyKelvin">Expanded uncertainty, kelvin.</param>
/// <param name="CoverageFactor">Coverage factor.</param>
/// <param name="Coefficients">Coefficients, lowest power first, degree Celsius; at least one.</param>
/// <param name="RawMinimum">Lowest raw value it is given for.</param>
/// <param name="RawMaximum">Highest raw value it is given for.</param>
public sealed record PolynomialCharacteristic(
    string RawUnit,
    double ExpandedUncertaintyKelvin,
    double CoverageFactor,
    IReadOnlyList<double> Coefficients,
    double RawMinimum,
    double RawMaximum)
    : Characteristic(RawUnit, ExpandedUncertaintyKelvin, CoverageFactor);
