namespace LabWatch.Lab.Alerts;

/// <summary>How soon somebody must act, from consequence and time to respond (IEC 62682).</summary>
public enum AlertPriority
{
    /// <summary>Look at it in the course of work.</summary>
    Low,

    /// <summary>Act within the shift.</summary>
    Medium,

    /// <summary>Act at once: somebody can be hurt or equipment damaged.</summary>
    High,
}
