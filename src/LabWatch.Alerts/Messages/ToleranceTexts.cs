using LabWatch.Alerts.Assessments;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Alerts.Messages;

/// <summary>Puts assessments out of tolerance into words.</summary>
internal sealed class ToleranceTexts(SiteTime time)
{
    private const int NameLength = 40;

    /// <summary>The condition that an assessment finds present or gone.</summary>
    public AlertCondition Describe(Assessment assessment, string sourceName, bool present, Instant at) => new(
        new AlertKey(assessment.Source, assessment.Criterion, assessment.Scope),
        present,
        at,
        present ? AssessmentVerdict.Priority(assessment.Decision) : AlertPriority.Low,
        present ? Headline(assessment, sourceName) : Returned(assessment, sourceName),
        Detail(assessment, sourceName, present),
        assessment.Value.HasValue ? assessment.Value.Value : null,
        assessment.Limit,
        assessment.Unit);

    private static string Headline(Assessment assessment, string sourceName) => assessment is { Limit: { } limit, Value.HasValue: true }
        ? Phrase.Headline(
            AlertTexts.ToleranceHeadline, Phrase.Cut(sourceName, NameLength), Subject(assessment), Phrase.Number(assessment.Value.Value),
            Phrase.Unit(assessment.Unit), Phrase.Number(limit), Word(assessment.Decision))
        : Phrase.Headline(AlertTexts.ToleranceHeadlineNoValue, Phrase.Cut(sourceName, NameLength), Subject(assessment), Word(assessment.Decision));

    private static string Returned(Assessment assessment, string sourceName) =>
        Phrase.Headline(AlertTexts.ToleranceReturnedHeadline, Phrase.Cut(sourceName, NameLength), Subject(assessment), Word(assessment.Decision));

    private string Detail(Assessment assessment, string sourceName, bool present)
    {
        string what = Phrase.Fill(
            AlertTexts.ToleranceWhat, Word(assessment.Decision), assessment.Explanation, time.Write(assessment.Window.Start),
            time.Write(assessment.Window.End), assessment.Revision);
        return Phrase.Fill(
            AlertTexts.PlainLayout, what, Phrase.Fill(AlertTexts.WhereSource, sourceName, assessment.Source), time.Write(assessment.Window.Start),
            present ? AlertTexts.ToleranceDo : AlertTexts.ToleranceReturnedDo);
    }

    private static string Subject(Assessment assessment) =>
        assessment.Scope.Length == 0 ? assessment.Criterion : Phrase.Cut($"{assessment.Criterion} ({assessment.Scope})", 2 * NameLength);

    private static string Word(Decision decision) => decision switch
    {
        Decision.Pass => AlertTexts.DecisionPass,
        Decision.ConditionalPass => AlertTexts.DecisionConditionalPass,
        Decision.ConditionalFail => AlertTexts.DecisionConditionalFail,
        Decision.Fail => AlertTexts.DecisionFail,
        _ => AlertTexts.DecisionNotDecided,
    };
}
