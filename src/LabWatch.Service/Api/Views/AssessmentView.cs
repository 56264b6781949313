using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>One revision of the assessment of a source by a criterion over a window.</summary>
internal sealed record AssessmentView(
    [property: Description("Id: a hash of source, criterion, scope, window and revision.")] string Id,
    [property: Description("Key of the source, site.source.")] string Source,
    [property: Description("Code of the criterion.")] string Criterion,
    [property: Description("What else it is about (channel, band, set point); empty where nothing.")] string Scope,
    [property: Description("First instant of the window.")] Instant WindowStart,
    [property: Description("First instant after the window.")] Instant WindowEnd,
    [property: Description("1 for the first, one more for each that supersedes.")] int Revision,
    [property: Description("The value, in unit; null where there is none.")] double? Value,
    [property: Description("Its standard uncertainty, in unit.")] double? StandardUncertainty,
    [property: Description("Effective degrees of freedom; null where infinite or unknown.")] double? DegreesOfFreedom,
    [property: Description("Coverage factor.")] double? CoverageFactor,
    [property: Description("Expanded uncertainty, in unit.")] double? ExpandedUncertainty,
    [property: Description("Unit of value and limit.")] string Unit,
    [property: Description("Largest permitted value, in unit; null where no limit applies.")] double? Limit,
    [property: Description("pass, conditional-pass, conditional-fail, fail (ILAC-G8:09/2019) or not-decided.")] string Decision,
    [property: Description("Probability that the true value is inside the limit (JCGM 106:2012), 0 to 1.")] double? ConformityProbability,
    [property: Description("Side results.")] IReadOnlyList<FigureView> Figures,
    [property: Description("The outcome in plain words with numbers and units.")] string Explanation,
    [property: Description("What it was made from.")] ProvenanceView Provenance,
    [property: Description("When it was computed.")] Instant ComputedAt,
    [property: Description("Why it supersedes the revision before; null for the first.")] string? SupersedeReason);
