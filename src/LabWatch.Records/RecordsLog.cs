using Microsoft.Extensions.Logging;

namespace LabWatch.Records;

/// <summary>Log messages of the records, ids 5000 to 5999.</summary>
internal static partial class RecordsLog
{
    [LoggerMessage(5000, LogLevel.Information, "Records: {Count} schema change(s) applied, now at {Schema}.")]
    public static partial void Migrated(ILogger logger, int count, string schema);

    [LoggerMessage(5001, LogLevel.Information, "Records: the file with schema {Schema} was copied to {Path} before the upgrade.")]
    public static partial void Copied(ILogger logger, string schema, string path);

    [LoggerMessage(5002, LogLevel.Warning, "Records: the database cannot be opened yet; every use of it tries again. {Reason}")]
    public static partial void NotReady(ILogger logger, string reason);

    [LoggerMessage(5010, LogLevel.Warning, "Audit trail: the end of the chains could not be written beside the database; it is tried again. {Reason}")]
    public static partial void HeadNotWritten(ILogger logger, string reason);

    [LoggerMessage(5011, LogLevel.Error, "Audit trail of {Site}: entry {Noted} was noted as the end of the chain, and the database, which ends at entry {Found}, does not hold it. The chain was cut, written anew, or the database was restored from a copy. This stands in the trail now.")]
    public static partial void HeadDiffers(ILogger logger, string site, long noted, long found);
}
