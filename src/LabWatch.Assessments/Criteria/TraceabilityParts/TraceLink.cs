namespace LabWatch.Assessments.Criteria.TraceabilityParts;

/// <summary>One link of a chain of calibrations.</summary>
/// <param name="Name">What it is, for example "certificate PR-26-0512 of well-bottom".</param>
/// <param name="Reference">How it stands on record, as <c>id@revision</c>.</param>
/// <param name="UsedPercent">Age in percent of its interval; NaN where no interval is set.</param>
/// <param name="DaysLeft">Days until it is due, negative when overdue; null where no interval is set.</param>
/// <param name="Rests">Whether results rest on it.</param>
internal sealed record TraceLink(string Name, string Reference, double UsedPercent, double? DaysLeft, bool Rests);
