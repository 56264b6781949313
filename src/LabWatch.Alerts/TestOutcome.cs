namespace LabWatch.Alerts;

/// <summary>How a test message ended.</summary>
/// <param name="IsTaken">Whether the receiver has taken it.</param>
/// <param name="Error">What went wrong, without secrets; null where nothing.</param>
public sealed record TestOutcome(bool IsTaken, string? Error);
