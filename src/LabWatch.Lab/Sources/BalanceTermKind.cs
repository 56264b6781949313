namespace LabWatch.Lab.Sources;

/// <summary>What a term of a <see cref="LearntBalance"/> is proportional to. Means over ten minutes; the rise is the reference temperature minus that of the air.</summary>
public enum BalanceTermKind
{
    /// <summary>1.</summary>
    Constant,

    /// <summary>Rise, in units of 100 K.</summary>
    Rise,

    /// <summary>sigma (T^4 - T_air^4), kW/m^2: radiation through the aperture.</summary>
    Radiation,

    /// <summary>The same while the shutter is open, else 0.</summary>
    RadiationOpen,

    /// <summary>Air temperature minus 23 degC, kelvin.</summary>
    Air,

    /// <summary>Rate of the reference temperature, kelvin per hour: heat stored in the cavity.</summary>
    Rate,

    /// <summary>Rise minus the rise smoothed over 30 min, in units of 100 K: heat stored in what follows within minutes.</summary>
    ShortLag,

    /// <summary>Rise minus the rise smoothed over 120 min, in units of 100 K: heat stored in the insulation.</summary>
    LongLag,

    /// <summary>Purge flow (l/min) times rise (100 K).</summary>
    PurgeFlow,
}
