namespace LabWatch.Intake.Brokers.External;

/// <summary>Why a connection to the broker ended.</summary>
internal enum LinkEnd
{
    /// <summary>The service stops.</summary>
    Stopped,

    /// <summary>The link broke, or the broker closed it.</summary>
    Lost,

    /// <summary>It did not answer a ping in time, though it looked connected.</summary>
    Dead,

    /// <summary>It answers, but no message has come for too long: the subscription may be lost.</summary>
    Quiet,

    /// <summary>More came than the queue holds; what was not acknowledged comes again.</summary>
    Overflow,

    /// <summary>Another client took the session.</summary>
    TakenOver,

    /// <summary>Commits stopped or resumed, or the pause after a takeover is over: another kind of connection is needed.</summary>
    KindChanged,
}
