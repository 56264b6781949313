namespace LabWatch.Alerts.Outbox;

/// <summary>What became of one attempt to send a message.</summary>
internal enum SendResult
{
    /// <summary>The receiver has it.</summary>
    Sent,

    /// <summary>It may work later.</summary>
    Retry,

    /// <summary>It will never work with this message.</summary>
    Refused,
}
