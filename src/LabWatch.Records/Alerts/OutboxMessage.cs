using LabWatch.Lab.Time;

namespace LabWatch.Records.Alerts;

/// <summary>A message on its way to one notifier.</summary>
/// <param name="Id">Hash of alert, transition and notifier: sending it twice is recognisable, and queueing it twice changes nothing.</param>
/// <param name="AlertId">The alert it is about.</param>
/// <param name="Notifier">Id of the notifier.</param>
/// <param name="Body">The message, JSON.</param>
/// <param name="QueuedAt">When it was queued.</param>
/// <param name="DueAt">When to try (again).</param>
/// <param name="Attempts">Attempts made.</param>
/// <param name="SentAt">When it was handed over; null before.</param>
/// <param name="GivenUpAt">When it was given up; null while it may still be sent.</param>
/// <param name="LastError">What the last attempt failed with; null where it did not.</param>
public sealed record OutboxMessage(
    string Id,
    Guid AlertId,
    string Notifier,
    string Body,
    Instant QueuedAt,
    Instant DueAt,
    int Attempts,
    Instant? SentAt,
    Instant? GivenUpAt,
    string? LastError);
