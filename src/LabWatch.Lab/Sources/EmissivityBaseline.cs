using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Sources;

/// <summary>An effective emissivity that a drift is told from.</summary>
/// <param name="Band">Id of the working band.</param>
/// <param name="SetPointCelsius">Set point it was found at, degree Celsius.</param>
/// <param name="EffectiveEmissivity">The effective emissivity for the temperature of the reference well.</param>
/// <param name="From">What it rests on, in words.</param>
/// <param name="At">When it was found; it applies from then on.</param>
public sealed record EmissivityBaseline(string Band, double SetPointCelsius, Estimate EffectiveEmissivity, string From, Instant At);
