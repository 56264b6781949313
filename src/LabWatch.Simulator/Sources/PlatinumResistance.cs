namespace LabWatch.Simulator.Sources;

/// <summary>Resistance of an industrial platinum thermometer (Callendar-Van Dusen, IEC 60751:2022).</summary>
/// <param name="R0Ohm">Resistance at 0 degC.</param>
/// <param name="A">Coefficient A, 1/degC.</param>
/// <param name="B">Coefficient B, 1/degC^2.</param>
/// <param name="C">Coefficient C, 1/degC^4, used below 0 degC.</param>
internal sealed record PlatinumResistance(double R0Ohm, double A = 3.9083e-3, double B = -5.775e-7, double C = -4.183e-12)
{
    /// <summary>Resistance in ohm at a temperature in degree Celsius.</summary>
    public double At(double celsius)
    {
        double cubic = celsius < 0 ? C * (celsius - 100) * celsius * celsius * celsius : 0;
        return R0Ohm * (1 + (A * celsius) + (B * celsius * celsius) + cubic);
    }
}
