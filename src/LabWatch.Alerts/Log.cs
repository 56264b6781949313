using LabWatch.Lab.Findings;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts;

/// <summary>Log lines of the alerts; ids 4000 to 4999, never reused.</summary>
internal static partial class Log
{
    [LoggerMessage(4000, LogLevel.Error, "A pack of {Source} could not be watched for hazards: a defect. Later packs are watched.")]
    public static partial void WatchFailed(ILogger logger, string source, Exception exception);

    [LoggerMessage(4001, LogLevel.Error, "The silence of hazard channels could not be judged: a defect. It is tried again in a second.")]
    public static partial void TickFailed(ILogger logger, Exception exception);

    [LoggerMessage(4002, LogLevel.Warning, "Hazards cannot be watched as meant: {Finding}")]
    public static partial void HazardFinding(ILogger logger, Finding finding);

    [LoggerMessage(4003, LogLevel.Warning, "The times at which hazard channels were last heard could not be stored; after a restart their silence is counted from the start.")]
    public static partial void HeardNotStored(ILogger logger, Exception exception);

    [LoggerMessage(4004, LogLevel.Warning, "Which runs are open could not be asked; a hot source counts as unattended when its time is over.")]
    public static partial void RunsUnknown(ILogger logger, Exception exception);

    [LoggerMessage(4005, LogLevel.Error, "The heartbeat was missed: the alert desk, the disk or the monitor did not answer. Tried again in ten seconds.")]
    public static partial void HeartbeatMissed(ILogger logger, Exception exception);

    [LoggerMessage(4010, LogLevel.Error, "The alert journal could not be written; steps are kept in memory and tried again with the next one. Check the disk.")]
    public static partial void JournalFailed(ILogger logger, Exception exception);

    [LoggerMessage(4011, LogLevel.Debug, "The alert journal has not answered within {Patience}; steps are handed to the notifiers before they are durable.")]
    public static partial void JournalSlow(ILogger logger, TimeSpan patience);

    [LoggerMessage(4012, LogLevel.Warning, "The alert journal was damaged: {Lines} lines were unreadable and kept in {File}; everything else was restored.")]
    public static partial void JournalDamaged(ILogger logger, int lines, string file);

    [LoggerMessage(4013, LogLevel.Information, "Alerts restored: {Open} open, {Messages} messages to send, {Unrecorded} steps to record.")]
    public static partial void Restored(ILogger logger, int open, int messages, int unrecorded);

    [LoggerMessage(4014, LogLevel.Error, "A piece of alert work failed: a defect. Later work goes on.")]
    public static partial void WorkFailed(ILogger logger, Exception exception);

    [LoggerMessage(4020, LogLevel.Warning, "The alert ledger does not answer; {Waiting} steps wait to be recorded. Hazards and notifiers go on without it.")]
    public static partial void LedgerFailed(ILogger logger, int waiting, Exception exception);

    [LoggerMessage(4021, LogLevel.Information, "The alert ledger answers again.")]
    public static partial void LedgerBack(ILogger logger);

    [LoggerMessage(4022, LogLevel.Error, "The alert ledger refuses one entry though it answers otherwise; the entry was set aside in {File}.")]
    public static partial void SetAside(ILogger logger, string file, Exception exception);

    [LoggerMessage(4030, LogLevel.Warning, "The assessments could not be followed; tried again in {Wait}.")]
    public static partial void FollowFailed(ILogger logger, TimeSpan wait, Exception exception);

    [LoggerMessage(4040, LogLevel.Warning, "ALERT {Event} [{Priority}] {Headline} (alert {Alert}, {Code})")]
    public static partial void AlertMessage(ILogger logger, string @event, string priority, string headline, Guid alert, string code);

    [LoggerMessage(4041, LogLevel.Warning, "Message {Message} did not reach notifier {Notifier} (attempt {Attempt}): {Error}. Tried again in {Wait}.")]
    public static partial void AttemptFailed(ILogger logger, string message, string notifier, int attempt, string error, TimeSpan wait);

    [LoggerMessage(4042, LogLevel.Error, "Message {Message} to notifier {Notifier} was given up after {Attempts} attempts: {Error}. Nobody was told this way.")]
    public static partial void GivenUp(ILogger logger, string message, string notifier, int attempts, string error);

    [LoggerMessage(4044, LogLevel.Error, "The subscriptions of devices in {File} could not be read: nobody gets push messages until people subscribe anew.")]
    public static partial void SubscriptionsUnreadable(ILogger logger, string file, Exception exception);

    [LoggerMessage(4043, LogLevel.Error, "The worker of notifier {Notifier} failed: a defect. It goes on.")]
    public static partial void NotifierFailed(ILogger logger, string notifier, Exception exception);
}
