namespace LabWatch.Lab.Sources;

/// <summary>What the purge of a cavity has to do.</summary>
/// <param name="MinimumFlowLitrePerMinute">Flow that was shown to suffice, litre per minute.</param>
/// <param name="DewPointCelsius">Dew or frost point of the gas at the aperture that this flow was shown to hold; null where it was not measured.</param>
/// <param name="ProtectAboveCelsius">Temperature above which the cavity is damaged by oxygen without that flow; null where it does not mind.</param>
public sealed record PurgeRequirement(double MinimumFlowLitrePerMinute, double? DewPointCelsius, double? ProtectAboveCelsius);
