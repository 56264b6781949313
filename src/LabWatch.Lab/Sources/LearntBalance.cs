using LabWatch.Lab.Time;

namespace LabWatch.Lab.Sources;

/// <summary>
/// What a source did while it was known to be in order: heater power, or the difference of a redundant thermometer from the reference, as a linear regression on
/// temperature, air, radiation, heat stored and purge flow, learnt from the readings of a stated span. A baseline that somebody has looked at and put on record.
/// </summary>
/// <param name="Channel">Channel of the heater power, or of the thermometer.</param>
/// <param name="Terms">Terms of the regression, at least one.</param>
/// <param name="ResidualDeviation">Standard deviation of the residuals of ten-minute means, in the unit of the balance (W, or K).</param>
/// <param name="Correlation">Correlation of neighbouring residuals, from 0 to below 1.</param>
/// <param name="Blocks">Number of ten-minute means learnt from.</param>
/// <param name="Range">Reference temperatures learnt from, degree Celsius: outside nothing is said.</param>
/// <param name="LearntFrom">Beginning of the span.</param>
/// <param name="LearntUntil">End of the span.</param>
public sealed record LearntBalance(
    string Channel,
    IReadOnlyList<BalanceTerm> Terms,
    double ResidualDeviation,
    double Correlation,
    int Blocks,
    PermittedRange Range,
    Instant LearntFrom,
    Instant LearntUntil)
{
    /// <summary>Digest of the readings learnt from; null where it is not stated.</summary>
    public string? ReadingsDigest { get; init; }

    /// <summary>Standard uncertainty of what it predicts, from the scatter that it was learnt from: s sqrt(p/n (1 + r)/(1 - r)), the mean over the points learnt from.</summary>
    public double PredictionDeviation => ResidualDeviation * Math.Sqrt(Terms.Count / (double)Blocks * (1 + Correlation) / (1 - Correlation));
}
