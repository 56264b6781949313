namespace LabWatch.Metrology.Attribution;

/// <summary>The result of an attribution.</summary>
/// <param name="Verdict">What may be said.</param>
/// <param name="Suspects">The causes of the explanation; or all that cannot be told apart; empty for the other verdicts.</param>
/// <param name="Inclusion">Probability of each candidate to be at work, alone or with another.</param>
/// <param name="Models">All explanations, the most probable first.</param>
/// <param name="Alike">Pairs of candidates that these bands could not separate even at the size found: their patterns differ by less than three standard uncertainties.</param>
public sealed record AttributionResult(
    AttributionVerdict Verdict,
    IReadOnlyList<Cause> Suspects,
    IReadOnlyList<(Cause Cause, double Probability)> Inclusion,
    IReadOnlyList<CauseModel> Models,
    IReadOnlyList<(Cause First, Cause Second)> Alike);
