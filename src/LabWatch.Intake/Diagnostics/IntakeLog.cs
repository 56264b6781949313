using Microsoft.Extensions.Logging;

namespace LabWatch.Intake.Diagnostics;

/// <summary>What the intake logs. Ids 1000 to 1999, never reused. No payloads, no credentials.</summary>
internal static partial class IntakeLog
{
    [LoggerMessage(1000, LogLevel.Error, "The reading tap {Tap} failed on a pack of {Source}; the pack goes on.")]
    public static partial void TapFailed(ILogger logger, Exception exception, string tap, string source);

    [LoggerMessage(1001, LogLevel.Warning, "The store has not answered within {Seconds} s; {Messages} messages go to the spool.")]
    public static partial void StoreSlow(ILogger logger, double seconds, int messages);

    [LoggerMessage(1002, LogLevel.Warning, "The store failed; {Messages} messages go to the spool.")]
    public static partial void StoreFailed(ILogger logger, Exception exception, int messages);

    [LoggerMessage(1003, LogLevel.Warning, "A commit that had not answered in time failed; its messages are in the spool.")]
    public static partial void LateAppendFailed(ILogger logger, Exception exception);

    [LoggerMessage(1004, LogLevel.Error, "The spool cannot be written.")]
    public static partial void SpoolFailed(ILogger logger, Exception exception);

    [LoggerMessage(1005, LogLevel.Critical, "Nothing can be made durable: the store does not answer and the spool ({Bytes} bytes) is full or fails. Hazards are still watched; brokers and devices keep their messages.")]
    public static partial void CommitsStopped(ILogger logger, long bytes);

    [LoggerMessage(1006, LogLevel.Information, "Messages are made durable again.")]
    public static partial void CommitsResumed(ILogger logger);

    [LoggerMessage(1007, LogLevel.Error, "The spool file {Path} is damaged in {Spans} places; its {Entries} intact entries are stored and the file is set aside.")]
    public static partial void SpoolDamaged(ILogger logger, string path, int spans, int entries);

    [LoggerMessage(1008, LogLevel.Information, "The spool is empty again after {Files} files.")]
    public static partial void SpoolDrained(ILogger logger, int files);

    [LoggerMessage(1009, LogLevel.Error, "A spool file cannot be read or removed.")]
    public static partial void SpoolUnreadable(ILogger logger, Exception exception);

    [LoggerMessage(1010, LogLevel.Error, "An entry of the spool is refused by itself ({Origin}); readings go to quarantine.")]
    public static partial void EntryRefused(ILogger logger, Exception exception, string origin);

    [LoggerMessage(1012, LogLevel.Error, "The spool file {Path} is set aside because not all of it could be stored.")]
    public static partial void SpoolSetAside(ILogger logger, string path);

    [LoggerMessage(1011, LogLevel.Warning, "The spool waits for the store: {Reason}")]
    public static partial void DrainWaits(ILogger logger, string reason);

    [LoggerMessage(1013, LogLevel.Error, "The decoder failed on a message; it goes to quarantine.")]
    public static partial void DecoderFailed(ILogger logger, Exception exception);

    [LoggerMessage(1014, LogLevel.Critical, "The committer failed and starts again; its batch is not acknowledged.")]
    public static partial void CommitterFailed(ILogger logger, Exception exception);

    [LoggerMessage(1020, LogLevel.Information, "Connected to the broker {Host}:{Port} as {ClientId}; session kept by the broker: {SessionPresent}.")]
    public static partial void Connected(ILogger logger, string host, int port, string clientId, bool sessionPresent);

    [LoggerMessage(1021, LogLevel.Warning, "The link to the broker {Host}:{Port} ended or could not be made: {Reason}. Next attempt in {Seconds} s.")]
    public static partial void LinkEnded(ILogger logger, string host, int port, string reason, double seconds);

    [LoggerMessage(1022, LogLevel.Error, "Another client has taken the session {ClientId}. It is left alone for {Seconds} s; find the second installation with this id.")]
    public static partial void SessionTakenOver(ILogger logger, string clientId, double seconds);

    [LoggerMessage(1023, LogLevel.Warning, "The broker keeps the session for {Granted} s instead of {Asked} s; after that a longer outage loses messages.")]
    public static partial void SessionExpiryShort(ILogger logger, uint granted, uint asked);

    [LoggerMessage(1024, LogLevel.Warning, "An acknowledgement could not be sent; the broker delivers the message again: {Reason}")]
    public static partial void AcknowledgeFailed(ILogger logger, string reason);

    [LoggerMessage(1026, LogLevel.Error, "The broker had not kept the session {ClientId}: what was sent while the link was down may be lost. Give the broker persistence.")]
    public static partial void SessionLost(ILogger logger, string clientId);

    [LoggerMessage(1030, LogLevel.Information, "The embedded broker listens on {Address}:{Port}.")]
    public static partial void EmbeddedStarted(ILogger logger, string address, int port);

    [LoggerMessage(1033, LogLevel.Warning, "The embedded broker refused a message of client {Client}: {Reason} Refused since the last line: {More} more.")]
    public static partial void EmbeddedRefused(ILogger logger, string client, string reason, int more);

    [LoggerMessage(1034, LogLevel.Debug, "An answer to a device could not be sent: {Reason}")]
    public static partial void DeviceGone(ILogger logger, string reason);

    [LoggerMessage(1035, LogLevel.Warning, "The embedded broker turned client {Client} at {Address} away: {Reason}")]
    public static partial void DeviceTurnedAway(ILogger logger, string client, string address, string reason);

    [LoggerMessage(1039, LogLevel.Warning, "The state of service or source could not be published at {Topic}: {Reason}")]
    public static partial void StateNotPublished(ILogger logger, string topic, string reason);

    [LoggerMessage(1036, LogLevel.Warning, "A message that a device wants retained is not kept: the limit of {Messages} messages or {Bytes} bytes is reached.")]
    public static partial void NotRetained(ILogger logger, int messages, long bytes);

    [LoggerMessage(1037, LogLevel.Error, "Retained messages could not be read or written: {Reason}")]
    public static partial void RetainedFailed(ILogger logger, string reason);

    [LoggerMessage(1038, LogLevel.Warning, "The embedded broker has as many connections as permitted ({Connections}); a further one is closed.")]
    public static partial void TooManyConnections(ILogger logger, int connections);

    [LoggerMessage(1042, LogLevel.Warning, "A connection from {Address} did not come to TLS: {Reason}")]
    public static partial void HandshakeFailed(ILogger logger, string address, string reason);

    [LoggerMessage(1040, LogLevel.Information, "The intake stops: {Queued} messages in the queue, {Spooled} in the spool.")]
    public static partial void Stopping(ILogger logger, int queued, long spooled);

    [LoggerMessage(1041, LogLevel.Warning, "The intake could not make everything durable within {Seconds} s; brokers and devices keep what was not acknowledged.")]
    public static partial void StopBudgetUsed(ILogger logger, double seconds);
}
