namespace LabWatch.Metrology.Thermometry;

/// <summary>Tolerances and ranges of the classes of IEC 60751:2022, 5.1. The ranges are from memory.</summary>
public static class ToleranceClasses
{
    /// <summary>Largest permitted deviation of a thermometer at a temperature, kelvin.</summary>
    public static double ToleranceKelvin(ToleranceClass toleranceClass, double celsius)
    {
        double magnitude = Math.Abs(celsius);
        return toleranceClass switch
        {
            ToleranceClass.AA => 0.1 + (0.0017 * magnitude),
            ToleranceClass.A => 0.15 + (0.002 * magnitude),
            ToleranceClass.B => 0.3 + (0.005 * magnitude),
            ToleranceClass.C => 0.6 + (0.01 * magnitude),
            _ => throw new ArgumentOutOfRangeException(nameof(toleranceClass), toleranceClass, "Not a tolerance class."),
        };
    }

    /// <summary>Range in which the class applies to a wire-wound resistor, degree Celsius.</summary>
    public static (double Minimum, double Maximum) WireWoundRange(ToleranceClass toleranceClass) => toleranceClass switch
    {
        ToleranceClass.AA => (-50, 250),
        ToleranceClass.A => (-100, 450),
        ToleranceClass.B or ToleranceClass.C => (-196, 600),
        _ => throw new ArgumentOutOfRangeException(nameof(toleranceClass), toleranceClass, "Not a tolerance class."),
    };

    /// <summary>Range in which the class applies to a film resistor, degree Celsius.</summary>
    public static (double Minimum, double Maximum) FilmRange(ToleranceClass toleranceClass) => toleranceClass switch
    {
        ToleranceClass.AA => (0, 150),
        ToleranceClass.A => (-30, 300),
        ToleranceClass.B => (-50, 500),
        ToleranceClass.C => (-50, 600),
        _ => throw new ArgumentOutOfRangeException(nameof(toleranceClass), toleranceClass, "Not a tolerance class."),
    };
}
