namespace LabWatch.Metrology.Thermometry;

/// <summary>Letter-designated thermocouple types of IEC 60584-1:2013.</summary>
public enum ThermocoupleType
{
    /// <summary>Platinum-30 % rhodium against platinum-6 % rhodium.</summary>
    B,

    /// <summary>Nickel-chromium against copper-nickel.</summary>
    E,

    /// <summary>Iron against copper-nickel.</summary>
    J,

    /// <summary>Nickel-chromium against nickel-aluminium.</summary>
    K,

    /// <summary>Nickel-chromium-silicon against nickel-silicon.</summary>
    N,

    /// <summary>Platinum-13 % rhodium against platinum.</summary>
    R,

    /// <summary>Platinum-10 % rhodium against platinum.</summary>
    S,

    /// <summary>Copper against copper-nickel.</summary>
    T,
}
