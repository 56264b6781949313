using LabWatch.Alerts.Assessments;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Alerts.Messages;

/// <summary>Puts assessments out of tolerance into words. Bands and channels are called by their names, not by their ids.</summary>
internal sealed class ToleranceTexts(SiteTime time)
{
    private const int NameLength = 40;
    private const int ScopeLength = 24;

    /// <summary>From this temperature on a source is called hot: the burn threshold for an unknown material and any contact time (ISO 13732-1), degree Celsius.</summary>
    private const double HotCelsius = 43;

    /// <summary>The condition that an assessment finds present or gone.</summary>
    /// <param name="assessment">The assessment.</param>
    /// <param name="source">The source as it is configured now; null where it is no more.</param>
    /// <param name="present">Whether the condition is there.</param>
    /// <param name="at">When it was found.</param>
    public AlertCondition Describe(Assessment assessment, ReferenceSource? source, bool present, Instant at) => new(
        new AlertKey(assessment.Source, assessment.Criterion, assessment.Scope),
        present,
        at,
        present ? AssessmentVerdict.Priority(assessment) : AlertPriority.Low,
        present ? Headline(assessment, source) : Phrase.Headline(AlertTexts.ToleranceReturnedHeadline, Name(assessment.Source, source), Subject(assessment.Criterion, assessment.Scope, source), Word(assessment.Decision)),
        Detail(assessment, source, present),
        assessment.Value.HasValue ? assessment.Value.Value : null,
        assessment.Limit,
        assessment.Unit);

    /// <summary>The end of an alert about something that is not judged any more.</summary>
    /// <param name="alert">The alert.</param>
    /// <param name="source">The source as it is configured now; null where it is no more.</param>
    /// <param name="why">Why it is judged no more, as a clause.</param>
    /// <param name="at">When that was found.</param>
    public AlertCondition NotJudged(Alert alert, ReferenceSource? source, string why, Instant at)
    {
        string subject = Subject(alert.Code, alert.Subject, source);
        string what = Phrase.Fill(AlertTexts.NotJudgedWhat, subject, why);
        return new(
            AlertKey.Of(alert), false, at, AlertPriority.Low,
            Phrase.Headline(AlertTexts.NotJudgedHeadline, Name(alert.Source, source), subject, why),
            Phrase.Fill(AlertTexts.PlainLayout, what, Where(alert.Source, source), time.Write(alert.RaisedAt), AlertTexts.NotJudgedDo) + Hot(source),
            alert.Value, alert.Limit, alert.Unit);
    }

    private static string Headline(Assessment assessment, ReferenceSource? source) => assessment is { Limit: { } limit, Value.HasValue: true }
        ? Phrase.Headline(
            AlertTexts.ToleranceHeadline, Name(assessment.Source, source), Phrase.Fill(CriterionTexts.Measured(assessment.Criterion), Scope(assessment.Scope, source)),
            Phrase.Quantity(assessment.Value.Value, assessment.Unit), Phrase.Quantity(limit, assessment.Unit), Word(assessment.Decision))
        : Phrase.Headline(AlertTexts.ToleranceHeadlineNoValue, Name(assessment.Source, source), Subject(assessment.Criterion, assessment.Scope, source), Word(assessment.Decision));

    private string Detail(Assessment assessment, ReferenceSource? source, bool present)
    {
        string what = Phrase.Fill(
            AlertTexts.ToleranceWhat, Word(assessment.Decision), assessment.Explanation, time.Write(assessment.Window.Start),
            time.Write(assessment.Window.End), assessment.Revision);
        return Phrase.Fill(
            AlertTexts.PlainLayout, what, Where(assessment.Source, source), time.Write(assessment.Window.Start),
            present ? CriterionTexts.Do(assessment.Criterion) : AlertTexts.ToleranceReturnedDo) + Hot(source);
    }

    private static string Hot(ReferenceSource? source) =>
        source is { MaximumCelsius: < HotCelsius } ? string.Empty : "\n" + AlertTexts.ToleranceHot + " " + AlertTexts.Caution;

    private static string Name(SourceKey key, ReferenceSource? source) => Phrase.Cut(source?.Name ?? key.Source, NameLength);

    private static string Where(SourceKey key, ReferenceSource? source) => Phrase.Fill(AlertTexts.WhereSource, source?.Name ?? key.Source, key);

    private static string Subject(string criterion, string scope, ReferenceSource? source) => CriterionCode.NameOf(criterion) + Scope(scope, source);

    private static string Scope(string scope, ReferenceSource? source) =>
        scope.Length == 0 ? string.Empty : $" ({Phrase.Cut(source?.NameOfScope(scope) ?? scope, ScopeLength)})";

    private static string Word(Decision decision) => decision switch
    {
        Decision.Pass => AlertTexts.DecisionPass,
        Decision.ConditionalPass => AlertTexts.DecisionConditionalPass,
        Decision.ConditionalFail => AlertTexts.DecisionConditionalFail,
        Decision.Fail => AlertTexts.DecisionFail,
        _ => AlertTexts.DecisionNotDecided,
    };
}
