namespace LabWatch.Metrology.Tests.Checks;

/// <summary>What came out of a check, as shown on the validation page.</summary>
/// <param name="IsMet">Whether the computed value agrees with the expected one within the tolerance.</param>
/// <param name="Expected">Expected value, as in the source.</param>
/// <param name="Computed">Computed value.</param>
/// <param name="Tolerance">Permitted difference.</param>
/// <param name="Margin">How much of the tolerance the difference uses, in percent.</param>
public sealed record CheckOutcome(bool IsMet, string Expected, string Computed, string Tolerance, string Margin);
