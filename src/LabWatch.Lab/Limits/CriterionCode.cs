namespace LabWatch.Lab.Limits;

/// <summary>Codes of the criteria that a source is assessed by.</summary>
public static class CriterionCode
{
    /// <summary>Half-range, standard deviation and slope of the reference thermometer.</summary>
    public const string Stability = "stability";

    /// <summary>Whether the source has settled at its set point.</summary>
    public const string Settled = "settled";

    /// <summary>Differences between calibrated wells.</summary>
    public const string AxialUniformity = "axial-uniformity";

    /// <summary>Effective emissivity by model and by comparator, and its drift.</summary>
    public const string EffectiveEmissivity = "effective-emissivity";

    /// <summary>Agreement of redundant thermometers.</summary>
    public const string ReferenceAgreement = "reference-agreement";

    /// <summary>Heater power against its baseline.</summary>
    public const string HeaterBalance = "heater-balance";

    /// <summary>Dew or frost point against the coldest wall.</summary>
    public const string Purge = "purge";

    /// <summary>Ambient conditions against the budget.</summary>
    public const string Surroundings = "surroundings";

    /// <summary>Certificates, chains, intervals and checks.</summary>
    public const string Traceability = "traceability";

    /// <summary>Live uncertainty budget against the calibration and measurement capability.</summary>
    public const string Budget = "budget";

    /// <summary>Missing, late, stuck, spiking or skewed data.</summary>
    public const string DataHealth = "data-health";

    /// <summary>The name of a criterion in a sentence, for example "axial uniformity".</summary>
    public static string NameOf(string code)
    {
        ArgumentNullException.ThrowIfNull(code);
        return code.Replace('-', ' ');
    }

    /// <summary>All codes, in the order they are shown.</summary>
    public static IReadOnlyList<string> All { get; } =
        [Stability, Settled, AxialUniformity, EffectiveEmissivity, ReferenceAgreement, HeaterBalance, Purge, Surroundings, Traceability, Budget, DataHealth];
}
