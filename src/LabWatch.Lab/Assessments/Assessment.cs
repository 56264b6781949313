using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Assessments;

/// <summary>One revision of the assessment of one source by one criterion over one window.</summary>
/// <param name="Source">The source.</param>
/// <param name="Criterion">Code of the criterion.</param>
/// <param name="Scope">What else it is about (channel, band, set point), empty where nothing.</param>
/// <param name="Window">Window of device time that it looks at.</param>
/// <param name="Revision">1 for the first, one more for each that supersedes.</param>
/// <param name="Value">The value with its standard uncertainty, in <paramref name="Unit"/>; <see cref="Estimate.None"/> where there is none.</param>
/// <param name="Unit">Unit of value and limit.</param>
/// <param name="Limit">Largest permitted value; null where no limit applies.</param>
/// <param name="CoverageFactor">Coverage factor that turns the standard into the expanded uncertainty shown; NaN where there is no value.</param>
/// <param name="Decision">The outcome.</param>
/// <param name="ConformityProbability">Probability that the true value is inside the limit (JCGM 106:2012); null where not decided.</param>
/// <param name="Figures">Side results.</param>
/// <param name="Explanation">The outcome in plain words with numbers and units.</param>
/// <param name="Provenance">What it was made from.</param>
/// <param name="ComputedAt">When it was computed.</param>
/// <param name="SupersedeReason">Why it supersedes the revision before; null for the first.</param>
public sealed record Assessment(
    SourceKey Source,
    string Criterion,
    string Scope,
    TimeWindow Window,
    int Revision,
    Estimate Value,
    string Unit,
    double? Limit,
    double CoverageFactor,
    Decision Decision,
    double? ConformityProbability,
    IReadOnlyList<AssessmentFigure> Figures,
    string Explanation,
    Provenance Provenance,
    Instant ComputedAt,
    string? SupersedeReason)
{
    /// <summary>The id: the first 32 hexadecimal digits of SHA-256 over source, criterion, scope, window and revision.</summary>
    public string Id => IdOf(Source, Criterion, Scope, Window, Revision);

    /// <summary>Expanded uncertainty in <see cref="Unit"/>.</summary>
    public double ExpandedUncertainty => CoverageFactor * Value.StandardUncertainty;

    /// <summary>The id that an assessment of these coordinates has.</summary>
    public static string IdOf(SourceKey source, string criterion, string scope, TimeWindow window, int revision)
    {
        string text = string.Create(
            CultureInfo.InvariantCulture,
            $"{source}\n{criterion}\n{scope}\n{window.Start.Microseconds}\n{window.End.Microseconds}\n{revision}");
        return Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(text)).AsSpan(0, 16));
    }
}
