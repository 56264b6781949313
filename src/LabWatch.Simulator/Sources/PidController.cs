namespace LabWatch.Simulator.Sources;

/// <summary>
/// Proportional-integral-derivative controller with output limits, conditional integration against wind-up, derivative on the measured value and a
/// ramp on the set point (Astrom and Hagglund, Advanced PID Control, 2006, chapter 3). Called once a second; watt and degree Celsius.
/// </summary>
internal sealed class PidController(PidTuning tuning)
{
    /// <summary>Integral part of the output, W.</summary>
    public double Integral { get; set; }

    /// <summary>Set point that the ramp has reached; NaN while switched off.</summary>
    public double RampedSetPoint { get; set; } = double.NaN;

    /// <summary>Measured value of the second before; NaN where there was none.</summary>
    public double Previous { get; set; } = double.NaN;

    /// <summary>The heater power for the next second; zero without a set point (NaN).</summary>
    public double Update(double measured, double setPoint)
    {
        if (double.IsNaN(setPoint))
        {
            Integral = 0;
            RampedSetPoint = double.NaN;
            Previous = double.NaN;
            return 0;
        }

        double ramp = tuning.RampKelvinPerMinute / 60;
        double from = double.IsNaN(RampedSetPoint) ? measured : RampedSetPoint;
        RampedSetPoint = from + Math.Clamp(setPoint - from, -ramp, ramp);
        double error = RampedSetPoint - measured;
        double rise = double.IsNaN(Previous) ? 0 : measured - Previous;
        Previous = measured;

        double wanted = (tuning.GainWattPerKelvin * error) + Integral - (tuning.GainWattPerKelvin * tuning.DerivativeSecond * rise);
        double output = Math.Clamp(wanted, 0, tuning.MaximumWatt);
        bool wouldWindUp = (wanted > output && error > 0) || (wanted < output && error < 0);
        if (!wouldWindUp)
        {
            Integral += tuning.GainWattPerKelvin / tuning.IntegralSecond * error;
        }

        return output;
    }
}
