namespace LabWatch.Assessments.Profiles;

/// <summary>By how much one standard uncertainty of an input changes the results.</summary>
/// <param name="Input">What the input is.</param>
/// <param name="Channel">Id of the channel it belongs to; null where to none.</param>
/// <param name="Change">The changes.</param>
/// <param name="NoisePart">The part of the input's standard uncertainty that comes from the scatter within the window, 0 to 1.</param>
public sealed record Contribution(ContributionKind Input, string? Channel, Radiated Change, double NoisePart);
