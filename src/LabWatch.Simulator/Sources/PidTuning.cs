namespace LabWatch.Simulator.Sources;

/// <summary>Settings of a source's controller.</summary>
/// <param name="MaximumWatt">Power at full output.</param>
/// <param name="GainWattPerKelvin">Proportional gain.</param>
/// <param name="IntegralSecond">Integral time.</param>
/// <param name="DerivativeSecond">Derivative time; zero for none.</param>
/// <param name="RampKelvinPerMinute">Fastest change of the set point that the ramp lets through.</param>
internal sealed record PidTuning(double MaximumWatt, double GainWattPerKelvin, double IntegralSecond, double DerivativeSecond, double RampKelvinPerMinute);
