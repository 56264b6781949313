namespace LabWatch.Assessments.Profiles;

/// <summary>A comparator beside the model of its band.</summary>
/// <param name="Point">What it shows.</param>
/// <param name="Emissivity">The effective emissivity that follows; null where it gives none.</param>
/// <param name="Refusal">Why what it shows decides nothing, as a clause with numbers; null where it may be used.</param>
public sealed record ComparatorProfile(ComparatorPoint Point, ComparatorEmissivity? Emissivity, string? Refusal);
