using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Messages;
using LabWatch.Lab;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Assessments;

/// <summary>
/// Whether what an alert is about is still judged: only then can an assessment end it. Otherwise it would stand for ever.
/// </summary>
internal static class Judged
{
    /// <summary>Why it is judged no more, as a clause; null where it is judged.</summary>
    /// <param name="lab">The site as it is configured now.</param>
    /// <param name="alert">What an alert from an assessment is about.</param>
    /// <param name="now">The present.</param>
    public static string? WhyNot(LabSnapshot lab, AlertKey alert, Instant now) =>
        lab.FindSource(alert.Source) is not { } source ? AlertTexts.NotJudgedNoSource
        : !source.HasScope(alert.Subject) ? AlertTexts.NotJudgedNoScope
        : !HasLimit(lab, source, alert, now) ? AlertTexts.NotJudgedNoLimit
        : null;

    // A limit for another set point counts: the source may come back to it.
    private static bool HasLimit(LabSnapshot lab, ReferenceSource source, AlertKey alert, Instant now)
    {
        string? band = source.FindChannel(alert.Subject)?.Band ?? alert.Subject;
        return lab.Limits.Any(limit => limit.Source == source.Key
            && string.Equals(limit.Criterion, alert.Code, StringComparison.Ordinal)
            && (limit.Band is null || string.Equals(limit.Band, band, StringComparison.Ordinal))
            && limit.EffectiveFrom <= now
            && !(limit.WithdrawnFrom <= now));
    }
}
