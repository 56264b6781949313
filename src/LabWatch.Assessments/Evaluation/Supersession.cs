using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Evaluation;

/// <summary>Why a new revision of an assessment supersedes the one before, in words.</summary>
internal static class Supersession
{
    /// <summary>What differs in what the two rest on; null where nothing does.</summary>
    public static string? Reason(Provenance former, Provenance present)
    {
        string[] reasons = [.. Source(former, present), .. Certificates(former, present), .. Limit(former, present), .. Readings(former, present)];
        return reasons.Length == 0 ? null : string.Join("; ", reasons) + ".";
    }

    /// <summary>Whether a source is described by another revision; what is on record without a revision was judged by the first.</summary>
    public static bool SourceDiffers(string? former, ReferenceSource present) =>
        former is null ? present.Revision > 1 : !string.Equals(former, present.Reference, StringComparison.Ordinal);

    private static IEnumerable<string> Source(Provenance former, Provenance present)
    {
        bool differs = former.Source is null
            ? present.Source?.EndsWith("@1", StringComparison.Ordinal) is false
            : !string.Equals(former.Source, present.Source, StringComparison.Ordinal);
        if (differs)
        {
            yield return $"The source is described by {present.Source} instead of {former.Source ?? "its first description"}";
        }
    }

    private static IEnumerable<string> Certificates(Provenance former, Provenance present)
    {
        if (!former.Certificates.SequenceEqual(present.Certificates, StringComparer.Ordinal))
        {
            yield return $"Certificate {List(present.Certificates)} is in force instead of {List(former.Certificates)}";
        }
    }

    private static IEnumerable<string> Limit(Provenance former, Provenance present)
    {
        if (!string.Equals(former.Limit, present.Limit, StringComparison.Ordinal))
        {
            yield return $"Limit {present.Limit ?? "none"} is in force instead of {former.Limit ?? "none"}";
        }
    }

    private static IEnumerable<string> Readings(Provenance former, Provenance present)
    {
        if (!string.Equals(former.ReadingsDigest, present.ReadingsDigest, StringComparison.Ordinal))
        {
            IEnumerable<string> hours = present.Hours
                .Where(hour => !former.Hours.Contains(hour))
                .Select(hour => $"{hour.Hour} (revision {hour.Revision.ToString(System.Globalization.CultureInfo.InvariantCulture)})");
            yield return $"Readings came in later, in the hour of {string.Join(", ", hours)}";
        }
    }

    private static string List(IReadOnlyList<string> references) => references.Count == 0 ? "none" : string.Join(", ", references);
}
