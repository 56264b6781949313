using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Evaluation;

/// <summary>The one way to look up the limit of a scope, for whoever decides and for whoever looks later whether another is in force.</summary>
internal static class LimitLookup
{
    /// <summary>The limit in force; null where there is none. Limits for a range of set points need a temperature.</summary>
    /// <param name="snapshot">What is configured about the site.</param>
    /// <param name="source">The source.</param>
    /// <param name="criterion">Code of the criterion.</param>
    /// <param name="nominalCelsius">Set point, or the temperature that stands for it, degree Celsius; NaN where unknown or without meaning.</param>
    /// <param name="band">The working band of the scope; null where it is about none.</param>
    /// <param name="at">End of the window.</param>
    public static AcceptanceLimit? InForce(LabSnapshot snapshot, SourceKey source, string criterion, double nominalCelsius, string? band, Instant at) =>
        snapshot.LimitInForce(source, criterion, double.IsNaN(nominalCelsius) ? null : nominalCelsius, band, at);
}
