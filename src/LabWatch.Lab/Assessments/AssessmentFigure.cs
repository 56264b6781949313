using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Assessments;

/// <summary>A named side result of an assessment, such as the slope beside the half-range.</summary>
/// <param name="Name">Machine name (a slug), for example <c>slope</c>.</param>
/// <param name="Value">The value with its uncertainty, in <paramref name="Unit"/>.</param>
/// <param name="Unit">Unit, for example <c>K/h</c>.</param>
public sealed record AssessmentFigure(string Name, Estimate Value, string Unit);
