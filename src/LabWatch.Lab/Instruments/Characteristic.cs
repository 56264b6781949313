namespace LabWatch.Lab.Instruments;

/// <summary>How a certificate turns a raw value into t90, with the expanded uncertainty it states. One derived record a kind.</summary>
/// <param name="RawUnit">Unit of the raw value it takes, by its SenML name.</param>
/// <param name="ExpandedUncertaintyKelvin">Expanded uncertainty of the resulting temperature, kelvin, positive.</param>
/// <param name="CoverageFactor">Coverage factor of the expanded uncertainty, positive.</param>
public abstract record Characteristic(string RawUnit, double ExpandedUncertaintyKelvin, double CoverageFactor);
