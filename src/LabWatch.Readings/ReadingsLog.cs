using Microsoft.Extensions.Logging;

namespace LabWatch.Readings;

internal static partial class ReadingsLog
{
    [LoggerMessage(2001, LogLevel.Information, "The readings in {Location} are open: commit {Change}, {Rows} journal rows with {Readings} readings read back in {Milliseconds} ms.")]
    public static partial void Opened(ILogger log, string location, long change, int rows, long readings, double milliseconds);

    [LoggerMessage(2002, LogLevel.Critical, "Set aside {Kind} {Reference}: {Reason} The bytes are kept.")]
    public static partial void SetAside(ILogger log, string kind, long reference, string reason);

    [LoggerMessage(2003, LogLevel.Error, "The store of readings does not answer: {Reason}")]
    public static partial void Unavailable(ILogger log, string reason, Exception error);

    [LoggerMessage(2004, LogLevel.Debug, "Sealed {Parts} source-hours with {Readings} readings into {Bytes} bytes.")]
    public static partial void Sealed(ILogger log, int parts, long readings, long bytes);

    [LoggerMessage(2005, LogLevel.Error, "Sealing failed and will be tried again; the readings are safe in the journal.")]
    public static partial void SealingFailed(ILogger log, Exception error);

    [LoggerMessage(2006, LogLevel.Warning, "The store of readings reopened after a failure and found {Rows} commits that had become durable after all.")]
    public static partial void FoundDurable(ILogger log, int rows);

    [LoggerMessage(2008, LogLevel.Warning, "The commit mark beside the readings could not be written; lost commits would be noticed later.")]
    public static partial void MarkFailed(ILogger log, Exception error);

    [LoggerMessage(2020, LogLevel.Information, "All {Parts} sealed parts were compared with their digests; {Wrong} differ.")]
    public static partial void IntegrityChecked(ILogger log, long parts, long wrong);

    [LoggerMessage(2021, LogLevel.Warning, "The comparison of sealed parts with their digests stopped and will begin again: {Reason}")]
    public static partial void IntegrityFailed(ILogger log, string reason);

    [LoggerMessage(2007, LogLevel.Critical, "The readings could not be opened and were moved to {Target}; a new store takes what comes now.")]
    public static partial void WholeSetAside(ILogger log, string target, Exception error);

    [LoggerMessage(2020, LogLevel.Error, "The database refuses {Count} readings; they are in the quarantine. The first: {Reason}")]
    public static partial void RefusedByDatabase(ILogger log, int count, string reason);
}
