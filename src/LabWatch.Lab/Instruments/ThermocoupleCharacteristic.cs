using LabWatch.Metrology.Thermometry;

namespace LabWatch.Lab.Instruments;

/// <summary>Thermocouple of IEC 60584-1:2013 with the deviation of its certificate.</summary>
/// <param name="ExpandedUncertaintyKelvin">Expanded uncertainty, kelvin, without that of the reference junction.</param>
/// <param name="CoverageFactor">Coverage factor.</param>
/// <param name="Type">Type.</param>
/// <param name="DeviationMillivolt">Coefficients of t, t^2, ... of the deviation from the reference function, millivolt; empty for none.</param>
/// <param name="ReferenceJunctionCelsius">
/// Temperature of the reference junctions where it is kept (0 in an ice bath), degree Celsius; null where another channel measures it.
/// </param>
public sealed record ThermocoupleCharacteristic(
    double ExpandedUncertaintyKelvin,
    double CoverageFactor,
    ThermocoupleType Type,
    IReadOnlyList<double> DeviationMillivolt,
    double? ReferenceJunctionCelsius)
    : Characteristic("mV", ExpandedUncertaintyKelvin, CoverageFactor);
