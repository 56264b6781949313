namespace LabWatch.Metrology.Thermometry;

/// <summary>One row of a correction table.</summary>
/// <param name="IndicatedCelsius">What the instrument indicates, degree Celsius.</param>
/// <param name="CorrectionKelvin">What must be added to the indication to get t90, kelvin.</param>
public readonly record struct CorrectionPoint(double IndicatedCelsius, double CorrectionKelvin);
