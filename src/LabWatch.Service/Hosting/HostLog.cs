namespace LabWatch.Service.Hosting;

/// <summary>Log messages of the host.</summary>
internal static partial class HostLog
{
    [LoggerMessage(7001, LogLevel.Information, "Lab file of site {Site} in force: import {Sequence}, digest {Digest}")]
    public static partial void LabInForce(ILogger logger, string site, int sequence, string digest);

    [LoggerMessage(7002, LogLevel.Warning, "The lab file in force is not on the record yet; trying again: {Reason}")]
    public static partial void LabNotRecorded(ILogger logger, string reason);

    [LoggerMessage(7004, LogLevel.Error, "The lab file is not in force: {Finding}")]
    public static partial void LabRefused(ILogger logger, Lab.Findings.Finding finding);

    [LoggerMessage(7003, LogLevel.Information, "Data in {Directory}")]
    public static partial void DataIn(ILogger logger, string directory);

    [LoggerMessage(7010, LogLevel.Warning, "The start is not in the audit trail yet; trying again: {Reason}")]
    public static partial void StartNotRecorded(ILogger logger, string reason);

    [LoggerMessage(7020, LogLevel.Error, "The watch over the storage failed once and goes on.")]
    public static partial void StorageWatchFailed(ILogger logger, Exception exception);
}
