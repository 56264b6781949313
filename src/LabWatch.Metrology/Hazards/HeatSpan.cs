namespace LabWatch.Metrology.Hazards;

/// <summary>What a heated source did over a span of time, as a lump.</summary>
/// <param name="Seconds">Length of the span.</param>
/// <param name="MeasuredKelvin">Rise of the thermometer.</param>
/// <param name="ExpectedKelvin">Rise by the energy balance; NaN where capacity and loss are not known.</param>
/// <param name="MeanWatt">Mean power of the heater.</param>
/// <param name="UnexplainedPart">
/// Heat that the thermometer misses (positive) or has too much (negative), as a part of the heater's energy; infinite where the heater gave none.
/// </param>
/// <param name="LeastExcessKelvin">Smallest excess over the set point in the span; NaN where that is not known.</param>
public readonly record struct HeatSpan(
    double Seconds, double MeasuredKelvin, double ExpectedKelvin, double MeanWatt, double UnexplainedPart, double LeastExcessKelvin);
