namespace LabWatch.Metrology.Uncertainty;

/// <summary>How a measured value is decided against a limit.</summary>
public enum DecisionRule
{
    /// <summary>Simple acceptance: the value alone is compared with the limit (ILAC-G8:09/2019, 4.2.1).</summary>
    SimpleAcceptance,

    /// <summary>Guard band w = U, with the words pass, conditional pass, conditional fail, fail (ILAC-G8:09/2019, 4.2.3).</summary>
    GuardBand,
}
