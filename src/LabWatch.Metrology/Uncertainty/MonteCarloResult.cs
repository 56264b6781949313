namespace LabWatch.Metrology.Uncertainty;

/// <summary>Result of a Monte Carlo propagation.</summary>
/// <param name="Mean">Mean of the model's values.</param>
/// <param name="StandardUncertainty">Their standard deviation.</param>
/// <param name="Low">Lower end of the coverage interval.</param>
/// <param name="High">Upper end of the coverage interval.</param>
/// <param name="Trials">Number of trials.</param>
/// <param name="IsStable">Whether the adaptive procedure ended by itself; true for a fixed number of trials.</param>
/// <param name="Tolerance">Numerical tolerance delta of the standard uncertainty (JCGM 101:2008, 7.9.2).</param>
public sealed record MonteCarloResult(
    double Mean, double StandardUncertainty, double Low, double High, long Trials, bool IsStable, double Tolerance);
