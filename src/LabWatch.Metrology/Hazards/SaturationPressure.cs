namespace LabWatch.Metrology.Hazards;

/// <summary>
/// Saturation vapour pressure over plane water (below 0 degC: supercooled) and over ice, and the temperature of a vapour pressure: dew and frost
/// point. Pascal and degree Celsius; usable from -100 to 100 degC, over ice to 0.01 degC.
/// </summary>
public static class SaturationPressure
{
    private const double Offset = 273.15;

    /// <summary>Pressure over water, pascal.</summary>
    public static double OverWater(double celsius, SaturationFormula formula = SaturationFormula.Sonntag) => Math.Exp(LogOverWater(celsius, formula));

    /// <summary>Pressure over ice, pascal.</summary>
    public static double OverIce(double celsius, SaturationFormula formula = SaturationFormula.Sonntag) => Math.Exp(LogOverIce(celsius, formula));

    /// <summary>Dew point of a vapour pressure, degree Celsius; NaN where the pressure is not positive.</summary>
    public static double DewPoint(double pascal, SaturationFormula formula = SaturationFormula.Sonntag) =>
        Root(pascal, 17.62, 243.12, celsius => LogOverWater(celsius, formula));

    /// <summary>Frost point of a vapour pressure, degree Celsius; NaN where the pressure is not positive.</summary>
    public static double FrostPoint(double pascal, SaturationFormula formula = SaturationFormula.Sonntag) =>
        Root(pascal, 22.46, 272.62, celsius => LogOverIce(celsius, formula));

    /// <summary>d(ln e)/dt over water, 1/K.</summary>
    public static double LogSlopeOverWater(double celsius, SaturationFormula formula = SaturationFormula.Sonntag) =>
        (LogOverWater(celsius + 1e-3, formula) - LogOverWater(celsius - 1e-3, formula)) / 2e-3;

    /// <summary>d(ln e)/dt over ice, 1/K.</summary>
    public static double LogSlopeOverIce(double celsius, SaturationFormula formula = SaturationFormula.Sonntag) =>
        (LogOverIce(celsius + 1e-3, formula) - LogOverIce(celsius - 1e-3, formula)) / 2e-3;

    private static double LogOverWater(double celsius, SaturationFormula formula)
    {
        double t = celsius + Offset;
        return formula switch
        {
            SaturationFormula.Sonntag => (-6096.9385 / t) + 21.2409642 + (t * (-2.711193e-2 + (t * 1.673952e-5))) + (2.433502 * Math.Log(t)),
            SaturationFormula.HylandWexler =>
                (-5.8002206e3 / t) + 1.3914993 + (t * (-4.8640239e-2 + (t * (4.1764768e-5 - (t * 1.4452093e-8))))) + (6.5459673 * Math.Log(t)),
            SaturationFormula.Hardy =>
                (((-2.8365744e3 / t) - 6.028076559e3) / t) + 1.954263612e1
                + (t * (-2.737830188e-2 + (t * (1.6261698e-5 + (t * (7.0229056e-10 - (t * 1.8680009e-13))))))) + (2.7150305 * Math.Log(t)),
            _ => Math.Log(611.2) + (17.62 * celsius / (243.12 + celsius)),
        };
    }

    private static double LogOverIce(double celsius, SaturationFormula formula)
    {
        double t = celsius + Offset;
        return formula switch
        {
            SaturationFormula.Sonntag => (-6024.5282 / t) + 29.32707 + (t * (1.0613868e-2 - (t * 1.3198825e-5))) - (0.49382577 * Math.Log(t)),
            SaturationFormula.HylandWexler =>
                (-5.6745359e3 / t) + 6.3925247
                + (t * (-9.6778430e-3 + (t * (6.2215701e-7 + (t * (2.0747825e-9 - (t * 9.4840240e-13))))))) + (4.1635019 * Math.Log(t)),
            SaturationFormula.Hardy =>
                (-5.8666426e3 / t) + 2.232870244e1 + (t * (1.39387003e-2 + (t * (-3.4262402e-5 + (t * 2.7040955e-8))))) + (6.7063522e-1 * Math.Log(t)),
            _ => Math.Log(611.2) + (22.46 * celsius / (272.62 + celsius)),
        };
    }

    /// <summary>Secant steps from the closed inverse of the Magnus form.</summary>
    private static double Root(double pascal, double a, double b, Func<double, double> logPressure)
    {
        if (!(pascal > 0) || double.IsInfinity(pascal))
        {
            return double.NaN;
        }

        double target = Math.Log(pascal);
        double magnus = target - Math.Log(611.2);
        double celsius = b * magnus / (a - magnus);
        for (int step = 0; step < 30; step++)
        {
            double slope = (logPressure(celsius + 1e-3) - logPressure(celsius - 1e-3)) / 2e-3;
            double change = (logPressure(celsius) - target) / slope;
            celsius -= change;
            if (Math.Abs(change) < 1e-11)
            {
                return celsius;
            }
        }

        return double.NaN;
    }
}
