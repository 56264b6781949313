using LabWatch.Metrology.Thermometry;

namespace LabWatch.Lab.Instruments;

/// <summary>
/// Standard platinum resistance thermometer on the ITS-90: W = R / R(TPW), with the R(TPW) in force (<see cref="TriplePointCheck"/>) and the
/// deviation functions of the certificate.
/// </summary>
/// <param name="ExpandedUncertaintyKelvin">Expanded uncertainty, kelvin, without that of R(TPW).</param>
/// <param name="CoverageFactor">Coverage factor.</param>
/// <param name="TriplePointOhm">R(TPW) stated by the certificate, ohm: used until a triple-point check is recorded.</param>
/// <param name="Below">Deviation function for W up to 1; null where the certificate has none.</param>
/// <param name="Above">Deviation function for W above 1; null where the certificate has none. At least one of the two is there.</param>
public sealed record SprtCharacteristic(
    double ExpandedUncertaintyKelvin, double CoverageFactor, double TriplePointOhm, SprtDeviation? Below, SprtDeviation? Above)
    : Characteristic("Ohm", ExpandedUncertaintyKelvin, CoverageFactor);
