namespace LabWatch.Assessments.Profiles;

/// <summary>What a source radiates in one band.</summary>
/// <param name="Radiance">The radiance with its model.</param>
/// <param name="Baseline">What a departure is told from.</param>
/// <param name="Comparators">The comparators of the band.</param>
public sealed record BandProfile(BandRadiance Radiance, Baseline Baseline, IReadOnlyList<ComparatorProfile> Comparators);
