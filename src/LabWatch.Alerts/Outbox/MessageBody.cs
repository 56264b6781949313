using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Outbox;

/// <summary>What a notifier sends, as JSON. Members are only ever added.</summary>
internal sealed record MessageBody(
    string Message,
    Guid Alert,
    int Sequence,
    string Event,
    Instant At,
    SourceKey Source,
    string Code,
    string Subject,
    string Priority,
    string State,
    string Headline,
    string Detail,
    string Caution,
    Instant RaisedAt,
    Instant? ReturnedAt,
    Instant? AcknowledgedAt,
    string? AcknowledgedBy,
    double? Value,
    double? Limit,
    string Unit);
