using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The outcome of an assessment, without what it was made from.</summary>
internal sealed record OutcomeView(
    [property: Description("Id of the assessment.")] string Id,
    [property: Description("Key of the source, site.source.")] string Source,
    [property: Description("Code of the criterion.")] string Criterion,
    [property: Description("What else it is about (channel, band, set point); empty where nothing.")] string Scope,
    [property: Description("First instant of the window.")] Instant WindowStart,
    [property: Description("First instant after the window.")] Instant WindowEnd,
    [property: Description("1 for the first, one more for each that supersedes.")] int Revision,
    [property: Description("The value, in unit; null where there is none.")] double? Value,
    [property: Description("Coverage factor.")] double? CoverageFactor,
    [property: Description("Expanded uncertainty, in unit.")] double? ExpandedUncertainty,
    [property: Description("Unit of value and limit.")] string Unit,
    [property: Description("Largest permitted value, in unit; null where no limit applies.")] double? Limit,
    [property: Description("pass, conditional-pass, conditional-fail, fail (ILAC-G8:09/2019) or not-decided.")] string Decision,
    [property: Description("When it was computed.")] Instant ComputedAt);
