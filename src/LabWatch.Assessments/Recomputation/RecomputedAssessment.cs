using LabWatch.Lab.Assessments;

namespace LabWatch.Assessments.Recomputation;

/// <summary>One assessment on record, computed again.</summary>
/// <param name="Standing">The revision on record that stands.</param>
/// <param name="Agreement">How the two compare.</param>
/// <param name="Difference">What differs, in words; empty where nothing does.</param>
/// <param name="Superseding">The revision that supersedes it, where one was recorded.</param>
public sealed record RecomputedAssessment(Assessment Standing, Agreement Agreement, string Difference, Assessment? Superseding);
