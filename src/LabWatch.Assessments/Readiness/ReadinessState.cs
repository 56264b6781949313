namespace LabWatch.Assessments.Readiness;

/// <summary>Whether a source may be calibrated with, now.</summary>
public enum ReadinessState
{
    /// <summary>Nothing is known: there are no readings, or the newest are too old.</summary>
    Unknown,

    /// <summary>The source is not being driven. It can still be hot.</summary>
    Off,

    /// <summary>The source is below its set point and on its way up.</summary>
    Heating,

    /// <summary>The source is above its set point and on its way down.</summary>
    Cooling,

    /// <summary>The source is at its set point, and it has not been shown yet that it is stable there.</summary>
    Settling,

    /// <summary>Everything that is watched permits calibration.</summary>
    Ready,

    /// <summary>Something forbids calibration that waiting does not cure.</summary>
    NotFit,
}
