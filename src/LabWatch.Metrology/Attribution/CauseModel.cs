using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Attribution;

/// <summary>An explanation by no, one or two causes.</summary>
/// <param name="Causes">The causes; empty for chance alone.</param>
/// <param name="Probability">Probability of the explanation among all that were tried.</param>
/// <param name="Sizes">Size of each cause by generalised least squares, in its unit; empty where the bands do not determine them.</param>
/// <param name="ChiSquared">Chi-squared of the fit; of the deviations themselves for chance alone; NaN where there is no fit.</param>
/// <param name="DegreesOfFreedom">Its degrees of freedom.</param>
public sealed record CauseModel(
    IReadOnlyList<Cause> Causes, double Probability, IReadOnlyList<Estimate> Sizes, double ChiSquared, int DegreesOfFreedom);
