using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Records.Storage.Rows;

namespace LabWatch.Records.Storage;

/// <summary>Assessment to row and back, without loss.</summary>
internal static class AssessmentMapping
{
    public static AssessmentRow ToRow(Assessment assessment, long sequence) => new()
    {
        Id = assessment.Id,
        Sequence = sequence,
        Site = assessment.Source.Site,
        Source = assessment.Source.Source,
        Criterion = assessment.Criterion,
        Scope = assessment.Scope,
        WindowStart = assessment.Window.Start.Microseconds,
        WindowEnd = assessment.Window.End.Microseconds,
        Revision = assessment.Revision,
        Value = StoredDocuments.NotANumberToNull(assessment.Value.Value),
        StandardUncertainty = StoredDocuments.NotANumberToNull(assessment.Value.StandardUncertainty),
        DegreesOfFreedom = StoredDocuments.NotANumberToNull(assessment.Value.DegreesOfFreedom),
        Unit = assessment.Unit,
        LimitValue = assessment.Limit,
        CoverageFactor = StoredDocuments.NotANumberToNull(assessment.CoverageFactor),
        Decision = StoredNames.Of(assessment.Decision),
        ConformityProbability = assessment.ConformityProbability,
        Figures = StoredDocuments.Write(assessment.Figures),
        Explanation = assessment.Explanation,
        Provenance = StoredDocuments.Write(assessment.Provenance),
        ComputedAt = assessment.ComputedAt.Microseconds,
        SupersedeReason = assessment.SupersedeReason,
    };

    public static Assessment ToAssessment(AssessmentRow row) => new(
        new SourceKey(row.Site, row.Source),
        row.Criterion,
        row.Scope,
        new TimeWindow(new Instant(row.WindowStart), new Instant(row.WindowEnd)),
        row.Revision,
        new Estimate(row.Value ?? double.NaN, row.StandardUncertainty ?? double.NaN, row.DegreesOfFreedom ?? double.NaN),
        row.Unit,
        row.LimitValue,
        row.CoverageFactor ?? double.NaN,
        StoredNames.ReadDecision(row.Decision),
        row.ConformityProbability,
        StoredDocuments.ReadFigures(row.Figures),
        row.Explanation,
        StoredDocuments.ReadProvenance(row.Provenance),
        new Instant(row.ComputedAt),
        row.SupersedeReason);
}
