using LabWatch.Lab.Assessments;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Assessments as the API shows them.</summary>
internal static class AssessmentViews
{
    /// <summary>One assessment.</summary>
    public static AssessmentView Of(Assessment assessment) => new(
        assessment.Id,
        assessment.Source.ToString(),
        assessment.Criterion,
        assessment.Scope,
        assessment.Window.Start,
        assessment.Window.End,
        assessment.Revision,
        Numbers.OrNull(assessment.Value.Value),
        Numbers.OrNull(assessment.Value.StandardUncertainty),
        Numbers.OrNull(assessment.Value.DegreesOfFreedom),
        Numbers.OrNull(assessment.CoverageFactor),
        Numbers.OrNull(assessment.ExpandedUncertainty),
        assessment.Unit,
        assessment.Limit is { } limit ? Numbers.OrNull(limit) : null,
        Names.Of(assessment.Decision),
        assessment.ConformityProbability is { } probability ? Numbers.OrNull(probability) : null,
        [.. assessment.Figures.Select(figure => new FigureView(
            figure.Name, Numbers.OrNull(figure.Value.Value), Numbers.OrNull(figure.Value.StandardUncertainty), figure.Unit))],
        assessment.Explanation,
        Of(assessment.Provenance),
        assessment.ComputedAt,
        assessment.SupersedeReason);

    /// <summary>The outcome of one assessment.</summary>
    public static OutcomeView OutcomeOf(Assessment assessment) => new(
        assessment.Id,
        assessment.Source.ToString(),
        assessment.Criterion,
        assessment.Scope,
        assessment.Window.Start,
        assessment.Window.End,
        assessment.Revision,
        Numbers.OrNull(assessment.Value.Value),
        Numbers.OrNull(assessment.CoverageFactor),
        Numbers.OrNull(assessment.ExpandedUncertainty),
        assessment.Unit,
        assessment.Limit is { } limit ? Numbers.OrNull(limit) : null,
        Names.Of(assessment.Decision),
        assessment.ComputedAt);

    private static ProvenanceView Of(Provenance provenance) => new(
        provenance.ReadingsDigest,
        [.. provenance.Hours.Select(hour => new HourReadView(hour.Hour, hour.Revision))],
        provenance.Certificates,
        provenance.Limit,
        provenance.ProgramVersion,
        provenance.Source);
}
