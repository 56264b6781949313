using LabWatch.Alerts.Journal;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Alerts.Assessments;

/// <summary>
/// The rules by which assessments raise and end alerts.
/// <list type="bullet">
/// <item>Only the newest decided window of a (source, criterion, scope) counts, in its highest revision; what is older changes nothing.</item>
/// <item>Fail raises at medium priority, conditional fail and any fail of data-health at low; a fail after a conditional fail raises again.</item>
/// <item>Both only while the window's end lies back by no more than a set number of window lengths: history raises nothing.</item>
/// <item>Pass returns, however old: it is the newest that is known. Conditional pass neither raises nor returns: the guard band is the dead-band.</item>
/// <item>Not decided changes nothing and does not count as newest.</item>
/// <item>What is judged no more (source, scope or limit is gone) raises nothing, and its alert returns; see <see cref="Judged"/>.</item>
/// </list>
/// </summary>
internal static class AssessmentVerdict
{
    /// <summary>The newest decided assessment of each (source, criterion, scope) in a batch that supersedes what was known.</summary>
    public static IReadOnlyList<Assessment> Newest(IEnumerable<Assessment> batch, Func<DecidedWindow, DecidedWindow?> known)
    {
        Dictionary<(Lab.Identity.SourceKey, string, string), Assessment> newest = [];
        foreach (Assessment assessment in batch.Where(assessment => assessment.Decision != Decision.NotDecided))
        {
            DecidedWindow window = DecidedWindow.Of(assessment);
            (Lab.Identity.SourceKey, string, string) key = (assessment.Source, assessment.Criterion, assessment.Scope);
            bool beatsBatch = !newest.TryGetValue(key, out Assessment? other) || window.Supersedes(DecidedWindow.Of(other));
            if (beatsBatch && window.Supersedes(known(window)))
            {
                newest[key] = assessment;
            }
        }

        return [.. newest.Values];
    }

    /// <summary>Whether an assessment says that a condition is there (true), gone (false) or nothing (null).</summary>
    /// <param name="assessment">The newest decided one.</param>
    /// <param name="now">The present.</param>
    /// <param name="oldestWindows">How many lengths of its window it may lie back and still raise.</param>
    public static bool? Present(Assessment assessment, Instant now, double oldestWindows) => assessment.Decision switch
    {
        Decision.Pass => false,
        Decision.Fail or Decision.ConditionalFail when now - assessment.Window.End <= assessment.Window.Duration * oldestWindows => true,
        _ => null,
    };

    /// <summary>
    /// How soon to act: what makes calibrations wrong at once goes before what may, and before data that are missing or bad, about which the criteria
    /// that rest on them say more.
    /// </summary>
    public static AlertPriority Priority(Assessment assessment) =>
        assessment.Decision is Decision.ConditionalFail || string.Equals(assessment.Criterion, CriterionCode.DataHealth, StringComparison.Ordinal)
            ? AlertPriority.Low
            : AlertPriority.Medium;
}
