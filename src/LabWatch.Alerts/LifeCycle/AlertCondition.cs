using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.LifeCycle;

/// <summary>What a watch found: a condition is there, or is there no more. Already de-bounced.</summary>
/// <param name="Key">What it is about.</param>
/// <param name="Present">Whether the condition stands.</param>
/// <param name="At">When it was found.</param>
/// <param name="Priority">How soon to act.</param>
/// <param name="Headline">What and where with value and limit, at most 160 characters.</param>
/// <param name="Detail">The same at length.</param>
/// <param name="Value">The value found; null where there is none.</param>
/// <param name="Limit">The limit; null where there is none.</param>
/// <param name="Unit">Unit of value and limit.</param>
internal sealed record AlertCondition(
    AlertKey Key,
    bool Present,
    Instant At,
    AlertPriority Priority,
    string Headline,
    string Detail,
    double? Value,
    double? Limit,
    string Unit);
