using LabWatch.Metrology.Thermometry;

namespace LabWatch.Lab.Instruments;

/// <summary>Indicating thermometer: t90 = indication + correction, the correction interpolated linearly between the points of a table.</summary>
/// <param name="ExpandedUncertaintyKelvin">Expanded uncertainty, kelvin.</param>
/// <param name="CoverageFactor">Coverage factor.</param>
/// <param name="Points">Points in strictly rising order of indication, at least one.</param>
public sealed record CorrectionTableCharacteristic(
    double ExpandedUncertaintyKelvin, double CoverageFactor, IReadOnlyList<CorrectionPoint> Points)
    : Characteristic("Cel", ExpandedUncertaintyKelvin, CoverageFactor);
