using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Readiness;

/// <summary>
/// What the criteria say about the source where it is now. A fail blocks. Stability must have been shown at this set point lately; so must every other criterion
/// with a limit in force here, as long as waiting can bring it: what is not decided then is told and does not block. The health of the data blocks where it failed.
/// </summary>
internal static class CriterionReasons
{
    public static IReadOnlyList<ReadinessReason> Of(ReadinessInput input, SourceNow now) =>
        [.. input.Criteria.Where(criterion => criterion.Channels(input.Source).Count > 0).SelectMany(criterion => Of(input, now, criterion))];

    private static IEnumerable<ReadinessReason> Of(ReadinessInput input, SourceNow now, ICriterion criterion)
    {
        bool isStability = string.Equals(criterion.Code, CriterionCode.Stability, StringComparison.Ordinal);
        List<Assessment> latest =
            [.. input.Assessments
                .Where(item => item.Source == input.Source.Key && string.Equals(item.Criterion, criterion.Code, StringComparison.Ordinal) && input.Source.HasScope(item.Scope))
                .GroupBy(item => item.Scope, StringComparer.Ordinal)
                .OrderBy(scope => scope.Key, StringComparer.Ordinal)
                .Select(scope => scope.MaxBy(item => (item.Window.End, item.Revision))!)
                .Where(item => isStability || HasLimit(input, now, criterion, item.Scope))];
        if (latest.Count == 0)
        {
            return isStability || HasAnyLimit(input, now, criterion)
                ? [NotShown(criterion, $"Its {CriterionCode.NameOf(criterion.Code)} has not been assessed yet.")]
                : [];
        }

        return latest.Select(item => Of(input, now, criterion, item));
    }

    private static ReadinessReason Of(ReadinessInput input, SourceNow now, ICriterion criterion, Assessment latest)
    {
        string subject = Wording.Subject(criterion.Code, input.Source, latest.Scope);
        TimeSpan age = input.Now - latest.Window.End;
        if (age > LongestAge(criterion.Schedule))
        {
            return NotShown(criterion, $"The latest assessment of its {subject} is {Quantities.Duration(age)} old.");
        }

        double setPoint = CriterionResult.Figure(latest.Figures, FigureName.SetPoint);
        if (Math.Abs(setPoint - now.SetPointCelsius) > SetPointHistory.SameWithinKelvin)
        {
            return NotShown(criterion, $"Its {subject} was last assessed at {Wording.Plain(setPoint)} degC, not at {Wording.Plain(now.SetPointCelsius)} degC.");
        }

        bool isStability = string.Equals(criterion.Code, CriterionCode.Stability, StringComparison.Ordinal);
        string sentence = Wording.FirstSentence(latest.Explanation);
        string text = isStability ? sentence : $"{char.ToUpperInvariant(subject[0])}{subject[1..]}: {sentence}";
        return latest.Decision is not Decision.NotDecided ? new(criterion.Code, text, latest.Decision is Decision.Fail or Decision.ConditionalFail)
            : isStability ? NotShown(criterion, text)
            : new(criterion.Code, text, false);
    }

    private static ReadinessReason NotShown(ICriterion criterion, string text) =>
        string.Equals(criterion.Code, CriterionCode.DataHealth, StringComparison.Ordinal)
            ? new(criterion.Code, text, false)
            : new(ReasonCode.Settling, text, true) { PassesByWaiting = true };

    private static bool HasLimit(ReadinessInput input, SourceNow now, ICriterion criterion, string scope) => LimitLookup.InForce(
        input.Snapshot, input.Source.Key, criterion.Code, now.SetPointCelsius, criterion.BandOf(input.Source, scope), input.Now) is not null;

    private static bool HasAnyLimit(ReadinessInput input, SourceNow now, ICriterion criterion) =>
        input.Source.Bands.Select(band => (string?)band.Id).Append(null).Any(band =>
            LimitLookup.InForce(input.Snapshot, input.Source.Key, criterion.Code, now.SetPointCelsius, band, input.Now) is not null);

    /// <summary>Two windows on the criterion's schedule: one may be late, two may not.</summary>
    private static TimeSpan LongestAge(CriterionSchedule schedule) => (2 * schedule.Every) + (schedule.Window / 2);
}
