using Microsoft.Extensions.Logging;

namespace LabWatch.Assessments;

/// <summary>Log messages of the assessments, ids 3000 to 3999.</summary>
internal static partial class AssessmentsLog
{
    [LoggerMessage(3000, LogLevel.Warning, "Assessments: tried again at the next wake-up. {Reason}")]
    public static partial void Unavailable(ILogger logger, string reason);

    [LoggerMessage(3001, LogLevel.Error, "Assessments: a source could not be assessed; its windows stay due.")]
    public static partial void Failed(ILogger logger, Exception exception);

    [LoggerMessage(3002, LogLevel.Warning, "The clock stepped by {Seconds} s against the monotonic clock; schedules were set anew.")]
    public static partial void ClockStepped(ILogger logger, double seconds);

    [LoggerMessage(3003, LogLevel.Information, "Assessments: planner started with {Criteria} criteria; it looks for due windows every {Seconds} s.")]
    public static partial void Started(ILogger logger, int criteria, double seconds);

    [LoggerMessage(3010, LogLevel.Warning, "Assessments: the kept trace {Path} is damaged or foreign; it is traced again.")]
    public static partial void TraceDamaged(ILogger logger, string path);

    [LoggerMessage(3011, LogLevel.Warning, "Assessments: the trace {Path} could not be read or kept: {Reason}")]
    public static partial void TraceNotKept(ILogger logger, string path, string reason);

    [LoggerMessage(3012, LogLevel.Error, "Assessments: the cavity model of {Source} could not be made.")]
    public static partial void WarmUpFailed(ILogger logger, Exception exception, string source);
}
