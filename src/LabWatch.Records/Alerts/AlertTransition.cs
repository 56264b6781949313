using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Alerts;

/// <summary>One step in the life of an alert.</summary>
/// <param name="Alert">The alert after the step.</param>
/// <param name="Sequence">1 for raised, one more for each later step.</param>
/// <param name="At">When.</param>
/// <param name="Event">What happened: <c>raised</c>, <c>acknowledged</c>, <c>returned</c> or <c>raised-again</c>.</param>
/// <param name="By">Who did it; <c>labwatch</c> for the service itself.</param>
/// <param name="Note">What that person wrote; null where nothing.</param>
public sealed record AlertTransition(Alert Alert, int Sequence, Instant At, string Event, string By, string? Note);
