namespace LabWatch.Lab.Alerts;

/// <summary>Codes of the hazards that are watched on every reading.</summary>
public static class HazardCode
{
    /// <summary>A touchable surface is above its burn threshold.</summary>
    public const string HotSurface = "hot-surface";

    /// <summary>A touchable surface is below its cold threshold.</summary>
    public const string ColdSurface = "cold-surface";

    /// <summary>A source is hotter than it may be.</summary>
    public const string OverTemperature = "over-temperature";

    /// <summary>Heater and thermometer contradict each other.</summary>
    public const string HeaterRunaway = "heater-runaway";

    /// <summary>Purge gas is missing while hot.</summary>
    public const string PurgeLost = "purge-lost";

    /// <summary>Water or frost forms in the cavity.</summary>
    public const string Condensation = "condensation";

    /// <summary>A source is hot and nobody is there.</summary>
    public const string UnattendedHot = "unattended-hot";

    /// <summary>The independent cut-out has tripped.</summary>
    public const string CutoutTripped = "cutout-tripped";

    /// <summary>The room is short of oxygen.</summary>
    public const string OxygenLow = "oxygen-low";

    /// <summary>Cooling water is missing.</summary>
    public const string CoolingLost = "cooling-lost";

    /// <summary>Bath level, stirrer or fluid temperature is out of bounds.</summary>
    public const string BathFault = "bath-fault";

    /// <summary>A channel that hazards are watched by has gone silent.</summary>
    public const string HazardSilent = "hazard-silent";

    /// <summary>All codes.</summary>
    public static IReadOnlyList<string> All { get; } =
        [HotSurface, ColdSurface, OverTemperature, HeaterRunaway, PurgeLost, Condensation, UnattendedHot, CutoutTripped, OxygenLow, CoolingLost, BathFault, HazardSilent];

    /// <summary>
    /// Whether an alert of a code latches (IEC 62682): once its condition has gone somebody must say so anew, although they had acknowledged it
    /// while it stood, because what it left behind must be looked at before work goes on.
    /// </summary>
    public static bool IsLatched(string code) => code is OverTemperature or HeaterRunaway or CutoutTripped or Condensation;

    /// <summary>Whether a code names a hazard (and not a criterion out of tolerance).</summary>
    public static bool IsHazard(string code) => All.Contains(code, StringComparer.Ordinal);
}
