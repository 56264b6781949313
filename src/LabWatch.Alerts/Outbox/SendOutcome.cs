namespace LabWatch.Alerts.Outbox;

/// <summary>What became of one attempt, and what the receiver asked for.</summary>
/// <param name="Result">The result.</param>
/// <param name="Error">What went wrong, in one line without secrets; null where nothing.</param>
/// <param name="RetryAfter">How long the receiver asked to wait; null where it did not.</param>
internal readonly record struct SendOutcome(SendResult Result, string? Error = null, TimeSpan? RetryAfter = null)
{
    /// <summary>The receiver has the message.</summary>
    public static SendOutcome Sent { get; } = new(SendResult.Sent);
}
