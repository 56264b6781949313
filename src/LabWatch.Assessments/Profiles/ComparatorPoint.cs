using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Profiles;

/// <summary>What a comparator shows of the source over a window.</summary>
/// <param name="Channel">Its channel.</param>
/// <param name="Celsius">Mean radiance temperature through its certificate; without a value where there is none.</param>
/// <param name="Certificate">Its certificate, as <c>id@revision</c>; null where none is in force.</param>
/// <param name="ShowsChangeOnly">Whether it was calibrated against this very source.</param>
/// <param name="Refusal">Why it gives no value, as a clause with numbers; null where it gives one.</param>
public sealed record ComparatorPoint(Channel Channel, Estimate Celsius, string? Certificate, bool ShowsChangeOnly, string? Refusal);
