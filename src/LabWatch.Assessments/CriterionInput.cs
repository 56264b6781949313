using LabWatch.Lab;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments;

/// <summary>All that a criterion sees.</summary>
/// <param name="Snapshot">What is configured about the site.</param>
/// <param name="Source">The source as it was at the end of the window.</param>
/// <param name="Window">The window to judge.</param>
/// <param name="Readings">Raw readings of the criterion's channels over the window and its lead-in.</param>
public sealed record CriterionInput(LabSnapshot Snapshot, ReferenceSource Source, TimeWindow Window, ReadingWindow Readings);
