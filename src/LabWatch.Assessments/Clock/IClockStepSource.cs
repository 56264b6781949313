namespace LabWatch.Assessments.Clock;

/// <summary>Tells of steps of the wall clock, for those whose work depends on it.</summary>
public interface IClockStepSource
{
    /// <summary>Raised once for each step of more than one second, at most ten seconds after it. Handlers return at once.</summary>
    event EventHandler<ClockStep>? Stepped;
}
