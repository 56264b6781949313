using Microsoft.Extensions.Logging;

namespace LabWatch.Evidence;

/// <summary>Log messages of the evidence, ids 8000 to 8999.</summary>
internal static partial class EvidenceLog
{
    [LoggerMessage(8000, LogLevel.Warning, "Audit trail: sealed hours could not be entered now; they are entered later. {Reason}")]
    public static partial void HoursNotEntered(ILogger logger, string reason);

    [LoggerMessage(8001, LogLevel.Error, "Audit trail: the store of readings no longer holds seal {Seal}, which was entered. The seals of the new store are entered from its first one on.")]
    public static partial void StoreBegunAnew(ILogger logger, long seal);
}
