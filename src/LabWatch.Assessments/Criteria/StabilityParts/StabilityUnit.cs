namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>The units in which a limit for a temperature difference may be given.</summary>
internal static class StabilityUnit
{
    /// <summary>The unit used where no limit names one.</summary>
    public const string Millikelvin = "mK";

    private const string Kelvin = "K";

    /// <summary>How many of the unit make one kelvin; NaN where it is no unit of temperature difference.</summary>
    public static double PerKelvin(string unit) => unit switch
    {
        Millikelvin => 1000,
        Kelvin => 1,
        _ => double.NaN,
    };
}
