using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>A baseline learnt from readings, in the form of the lab file.</summary>
internal sealed record BalanceView(
    [property: Description("Channel of the heater power, or of the thermometer.")] string Channel,
    [property: Description("Terms of the regression.")] IReadOnlyList<BalanceTermView> Terms,
    [property: Description("Standard deviation of the residuals of ten-minute means, W or K.")] double ResidualDeviation,
    [property: Description("Correlation of neighbouring residuals.")] double Correlation,
    [property: Description("Number of ten-minute means learnt from.")] int Blocks,
    [property: Description("Reference temperatures learnt from.")] BalanceRangeView Range,
    [property: Description("Beginning of the span.")] Instant LearntFrom,
    [property: Description("End of the span.")] Instant LearntUntil,
    [property: Description("SHA-256 over the digests of the readings of its days.")] string? ReadingsDigest);

/// <summary>One term.</summary>
internal sealed record BalanceTermView(
    [property: Description("What it is proportional to.")] string Kind,
    [property: Description("Coefficient.")] double Coefficient);

/// <summary>Temperatures.</summary>
internal sealed record BalanceRangeView(
    [property: Description("Lowest, degree Celsius.")] double MinimumCelsius,
    [property: Description("Highest, degree Celsius.")] double MaximumCelsius);
