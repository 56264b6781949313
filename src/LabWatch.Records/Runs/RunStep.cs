using LabWatch.Lab.Runs;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Runs;

/// <summary>One step in the life of a calibration run. It is never changed.</summary>
/// <param name="Number">1 for the start, one more for each later step.</param>
/// <param name="At">When.</param>
/// <param name="By">Account name of who did it.</param>
/// <param name="What"><c>started</c>, <c>ended</c>, <c>corrected</c> or <c>cancelled</c>.</param>
/// <param name="Reason">Why; null where none is asked for.</param>
/// <param name="After">The run as it stood after the step.</param>
public sealed record RunStep(int Number, Instant At, string By, string What, string? Reason, CalibrationRun After)
{
    /// <summary>The run began.</summary>
    public const string Started = "started";

    /// <summary>The run ended.</summary>
    public const string Ended = "ended";

    /// <summary>What was recorded of the run was wrong.</summary>
    public const string Corrected = "corrected";

    /// <summary>The run was called off.</summary>
    public const string Cancelled = "cancelled";
}
