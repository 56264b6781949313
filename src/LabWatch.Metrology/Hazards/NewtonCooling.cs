namespace LabWatch.Metrology.Hazards;

/// <summary>Newton's law of cooling, T(t) = T_a + (T_0 - T_a) exp(-t/tau): for warming too. Temperatures in degree Celsius, times in seconds.</summary>
public static class NewtonCooling
{
    /// <summary>Temperature after a time.</summary>
    public static double TemperatureAfter(double startCelsius, double ambientCelsius, double timeConstantSeconds, double seconds) =>
        ambientCelsius + ((startCelsius - ambientCelsius) * Math.Exp(-seconds / timeConstantSeconds));

    /// <summary>
    /// Time until a temperature is reached; NaN where it never is, because it lies on the other side of the ambient temperature or behind the start.
    /// </summary>
    public static double TimeTo(double startCelsius, double ambientCelsius, double timeConstantSeconds, double targetCelsius)
    {
        double ratio = (startCelsius - ambientCelsius) / (targetCelsius - ambientCelsius);
        return ratio >= 1 && double.IsFinite(ratio) ? timeConstantSeconds * Math.Log(ratio) : double.NaN;
    }

    /// <summary>Time constant from two readings a time apart, seconds; NaN where they do not approach the ambient temperature.</summary>
    public static double TimeConstant(double firstCelsius, double secondCelsius, double ambientCelsius, double secondsBetween)
    {
        double ratio = (firstCelsius - ambientCelsius) / (secondCelsius - ambientCelsius);
        return ratio > 1 && double.IsFinite(ratio) ? secondsBetween / Math.Log(ratio) : double.NaN;
    }
}
