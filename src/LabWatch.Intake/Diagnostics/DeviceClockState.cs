namespace LabWatch.Intake.Diagnostics;

/// <summary>How the clock of a device stands.</summary>
public enum DeviceClockState
{
    /// <summary>Too few messages to know.</summary>
    Learning,

    /// <summary>It keeps its offset.</summary>
    Steady,

    /// <summary>It has leapt ahead; its readings are refused until it is back.</summary>
    LeaptAhead,

    /// <summary>It has leapt back; its readings are refused until it is back.</summary>
    LeaptBack,
}
