using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.PurgeParts;

/// <summary>Purge over five minutes.</summary>
/// <param name="Wall">Coldest wall, degree Celsius.</param>
/// <param name="WallChannel">Channel that shows it.</param>
/// <param name="HottestCelsius">Hottest wall.</param>
/// <param name="Gas">Dew or frost point of the gas at the aperture, degree Celsius; none where it is not known.</param>
/// <param name="GasFrom">Where that comes from, in words.</param>
/// <param name="FlowLitrePerMinute">Purge flow; NaN where it is not known.</param>
internal sealed record PurgeMoment(Estimate Wall, string WallChannel, double HottestCelsius, Estimate Gas, string GasFrom, double FlowLitrePerMinute)
{
    private const double IceCelsius = 0;

    /// <summary>Dew or frost point minus the coldest wall, kelvin; negative where the gas is dry.</summary>
    public double ExcessKelvin => Gas.Value - Wall.Value;

    /// <summary>Relative humidity of the gas at the coldest wall, percent.</summary>
    public Estimate Humidity
    {
        get
        {
            if (!Gas.HasValue || !Wall.HasValue)
            {
                return Estimate.None;
            }

            double percent = 100 * Pressure(Gas.Value) / Pressure(Wall.Value);
            double byGas = LogSlope(Gas.Value) * Gas.StandardUncertainty, byWall = LogSlope(Wall.Value) * Wall.StandardUncertainty;
            return new(percent, percent * double.Hypot(byGas, byWall));
        }
    }

    /// <summary>Whether water freezes onto the wall.</summary>
    public bool Frosts => Gas.HasValue && Wall.Value < IceCelsius && ExcessKelvin >= 0;

    private static double Pressure(double celsius) => celsius < IceCelsius ? SaturationPressure.OverIce(celsius) : SaturationPressure.OverWater(celsius);

    private static double LogSlope(double celsius) =>
        celsius < IceCelsius ? SaturationPressure.LogSlopeOverIce(celsius, SaturationFormula.Sonntag) : SaturationPressure.LogSlopeOverWater(celsius, SaturationFormula.Sonntag);
}
