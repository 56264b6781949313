namespace LabWatch.Metrology.Hazards;

/// <summary>
/// From which temperature on a surface counts as cold. ISO 13732-3:2005 takes the skin's contact temperatures 0 degC (frostbite), 7 degC
/// (numbness) and 15 degC (pain) as its criteria (from memory of the standard, unconfirmed). A surface cannot cool skin below its own
/// temperature, so one above the criterion's temperature cannot reach it, whatever its material and however long the contact: the criteria
/// themselves are taken as thresholds, which is the careful side of the standard's curves.
/// </summary>
public static class ColdThreshold
{
    /// <summary>Frostbite, degree Celsius.</summary>
    public const double FrostbiteCelsius = 0;

    /// <summary>The threshold, degree Celsius: frostbite, or the laboratory's own limit where that is higher.</summary>
    public static double Celsius(double? laboratoryLimitCelsius) =>
        laboratoryLimitCelsius > FrostbiteCelsius ? laboratoryLimitCelsius.Value : FrostbiteCelsius;
}
