using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Hazards;

/// <summary>When a cooling sensor is expected to pass a threshold. It is an estimate about this sensor: treat as hot until measured.</summary>
/// <param name="TimeConstantSeconds">Fitted time constant, seconds.</param>
/// <param name="SecondsToThreshold">Time from the last reading until the fitted curve is at the threshold, seconds; 0 where it is there already.</param>
/// <param name="EarliestSeconds">Lower end of the interval, seconds, not negative.</param>
/// <param name="LatestSeconds">Upper end of the interval, seconds: what a person should be told.</param>
/// <param name="ResidualKelvin">Root mean square of the differences from the fitted curve, kelvin.</param>
public sealed record CoolingForecast(
    Estimate TimeConstantSeconds, Estimate SecondsToThreshold, double EarliestSeconds, double LatestSeconds, double ResidualKelvin);
