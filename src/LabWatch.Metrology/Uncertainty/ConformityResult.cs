namespace LabWatch.Metrology.Uncertainty;

/// <summary>A decision on a measured value with what it rests on.</summary>
/// <param name="Decision">The outcome.</param>
/// <param name="Probability">Probability that the true value conforms, 0 to 1; NaN where value or uncertainty is unknown.</param>
/// <param name="CoverageFactor">Coverage factor of the expanded uncertainty; NaN where degrees of freedom are unknown.</param>
/// <param name="ExpandedUncertainty">Expanded uncertainty, in the unit of the value.</param>
/// <param name="GuardBand">Width of the guard band w = r U, in the unit of the value; 0 under simple acceptance.</param>
public readonly record struct ConformityResult(
    Decision Decision, double Probability, double CoverageFactor, double ExpandedUncertainty, double GuardBand);
