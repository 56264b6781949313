using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Hazards;

/// <summary>Dew and frost point of moist air, and the way back. Relative humidity is that over water, in percent, at every temperature.</summary>
public static class Humidity
{
    /// <summary>Dew point (over water), degree Celsius with its standard uncertainty in kelvin; none where the humidity is not positive.</summary>
    /// <param name="celsius">Air temperature, degree Celsius.</param>
    /// <param name="relativePercent">Relative humidity, percent.</param>
    /// <param name="formula">Saturation formula.</param>
    public static Estimate DewPoint(Estimate celsius, Estimate relativePercent, SaturationFormula formula = SaturationFormula.Sonntag)
    {
        double pressure = VapourPressure(celsius.Value, relativePercent.Value, formula);
        double dewPoint = SaturationPressure.DewPoint(pressure, formula);
        return Result(celsius, relativePercent, formula, dewPoint, SaturationPressure.LogSlopeOverWater(dewPoint, formula));
    }

    /// <summary>Frost point (over ice), as <see cref="DewPoint"/>; it means something below 0 degC only.</summary>
    /// <param name="celsius">Air temperature, degree Celsius.</param>
    /// <param name="relativePercent">Relative humidity, percent.</param>
    /// <param name="formula">Saturation formula.</param>
    public static Estimate FrostPoint(Estimate celsius, Estimate relativePercent, SaturationFormula formula = SaturationFormula.Sonntag)
    {
        double pressure = VapourPressure(celsius.Value, relativePercent.Value, formula);
        double frostPoint = SaturationPressure.FrostPoint(pressure, formula);
        return Result(celsius, relativePercent, formula, frostPoint, SaturationPressure.LogSlopeOverIce(frostPoint, formula));
    }

    /// <summary>Relative humidity at a temperature, percent, of air with a frost point (degree Celsius).</summary>
    public static double RelativeOfFrostPoint(double celsius, double frostPoint, SaturationFormula formula = SaturationFormula.Sonntag) =>
        100 * SaturationPressure.OverIce(frostPoint, formula) / SaturationPressure.OverWater(celsius, formula);

    /// <summary>Relative humidity at a temperature, percent, of air with a dew point (degree Celsius).</summary>
    public static double RelativeOfDewPoint(double celsius, double dewPoint, SaturationFormula formula = SaturationFormula.Sonntag) =>
        100 * SaturationPressure.OverWater(dewPoint, formula) / SaturationPressure.OverWater(celsius, formula);

    /// <summary>Amount of water vapour to amount of dry gas, 1e-6, at a vapour pressure and a total pressure in pascal.</summary>
    public static double MoleRatio(double vapourPascal, double totalPascal) => 1e6 * vapourPascal / (totalPascal - vapourPascal);

    /// <summary>
    /// The temperature at which the first drop or crystal settles on a wall: the frost point where it lies below 0 degC, else the dew point.
    /// Over ice the gas is saturated earlier than over supercooled water, so this is the careful one of the two. Degree Celsius.
    /// </summary>
    public static double CondensationPoint(double celsius, double relativePercent, SaturationFormula formula = SaturationFormula.Sonntag)
    {
        double pressure = VapourPressure(celsius, relativePercent, formula);
        double frostPoint = SaturationPressure.FrostPoint(pressure, formula);
        return frostPoint < 0 ? frostPoint : SaturationPressure.DewPoint(pressure, formula);
    }

    private static double VapourPressure(double celsius, double relativePercent, SaturationFormula formula) =>
        relativePercent / 100 * SaturationPressure.OverWater(celsius, formula);

    private static Estimate Result(Estimate celsius, Estimate relativePercent, SaturationFormula formula, double point, double slope)
    {
        if (double.IsNaN(point))
        {
            return Estimate.None;
        }

        double fromTemperature = SaturationPressure.LogSlopeOverWater(celsius.Value, formula) / slope * celsius.StandardUncertainty;
        double fromHumidity = relativePercent.StandardUncertainty / (relativePercent.Value * slope);
        return new(
            point,
            double.Hypot(fromTemperature, fromHumidity),
            EffectiveDegreesOfFreedom.Of([(fromTemperature, celsius.DegreesOfFreedom), (fromHumidity, relativePercent.DegreesOfFreedom)]));
    }
}
