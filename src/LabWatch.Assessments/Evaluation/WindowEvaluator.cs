using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>Makes assessments of one window out of what a criterion finds and what it found it in.</summary>
/// <param name="snapshot">What is configured about the site.</param>
/// <param name="source">The source, out of the snapshot.</param>
/// <param name="criterion">The criterion.</param>
/// <param name="programVersion">Version that provenance names.</param>
internal sealed class WindowEvaluator(LabSnapshot snapshot, ReferenceSource source, ICriterion criterion, string programVersion)
{
    private readonly IReadOnlyList<string> _channels = criterion.Channels(source);

    public ICriterion Criterion => criterion;

    public ReferenceSource Source => source;

    /// <summary>The channels to read; empty where the criterion does not apply.</summary>
    public IReadOnlyList<string> Channels => _channels;

    /// <summary>The certificates in force for a window, as <c>id@revision</c> in ordinal order.</summary>
    public IReadOnlyList<string> CertificatesInForce(TimeWindow window) => !criterion.RestsOnCertificates
        ? []
        : [.. _channels
            .Select(id => source.FindChannel(id))
            .OfType<Channel>()
            .SelectMany(channel => CertificateTimeline.Of(snapshot, channel.Key, criterion.Schedule.SpanOf(window)).References)
            .Distinct()
            .Order(StringComparer.Ordinal)];

    /// <summary>Whether an assessment was made with other certificates or another limit than those in force now.</summary>
    public bool InputsDiffer(Assessment assessment)
    {
        double setPoint = CriterionResult.Figure(assessment.Figures, FigureName.SetPoint);
        double nominal = double.IsNaN(setPoint) ? CriterionResult.Figure(assessment.Figures, FigureName.Mean) : setPoint;
        AcceptanceLimit? limit = LimitLookup.InForce(
            snapshot, source.Key, criterion.Code, nominal, criterion.BandOf(source, assessment.Scope), assessment.Window.End);
        return !string.Equals(assessment.Provenance.Limit, ReferenceTo(limit), StringComparison.Ordinal)
            || !assessment.Provenance.Certificates.SequenceEqual(CertificatesInForce(assessment.Window), StringComparer.Ordinal);
    }

    /// <summary>
    /// Judges a window anew. Empty where no needed channel has a reading in the window, or where the assessments that stand rest on the
    /// same readings, certificates and limit; else first revisions, or revisions that supersede, with the reason.
    /// </summary>
    /// <param name="window">The window.</param>
    /// <param name="readings">Readings of <see cref="Channels"/> over at least the window and its lead-in.</param>
    /// <param name="standing">Highest revisions of this window's assessments, one a scope.</param>
    /// <param name="now">When it is computed.</param>
    public IReadOnlyList<Assessment> Evaluate(TimeWindow window, ReadingWindow readings, IReadOnlyList<Assessment> standing, Instant now)
    {
        ReadingWindow seen = readings.Slice(criterion.Schedule.SpanOf(window));
        if (seen.Slice(window).Series.Count == 0)
        {
            return [];
        }

        string digest = ReadingsDigest.Of(seen);
        if (standing.Count > 0 && standing.All(item => string.Equals(item.Provenance.ReadingsDigest, digest, StringComparison.Ordinal) && !InputsDiffer(item)))
        {
            return [];
        }

        IReadOnlyList<string> certificates = CertificatesInForce(window);
        return [.. criterion.Evaluate(new CriterionInput(snapshot, source, window, seen))
            .Select(result => Assess(
                window,
                result,
                new Provenance(digest, seen.Hours, certificates, ReferenceTo(result.Limit), programVersion),
                standing.FirstOrDefault(item => string.Equals(item.Scope, result.Scope, StringComparison.Ordinal)),
                now))
            .OfType<Assessment>()];
    }

    private Assessment? Assess(TimeWindow window, CriterionResult result, Provenance provenance, Assessment? former, Instant now)
    {
        string? reason = former is null ? null : Supersession.Reason(former.Provenance, provenance);
        return former is not null && reason is null
            ? null
            : new Assessment(
                source.Key, criterion.Code, result.Scope, window, (former?.Revision ?? 0) + 1, result.Value, result.Unit, LimitIn(result), result.CoverageFactor,
                result.Decision, result.ConformityProbability, result.Figures, result.Explanation, provenance, now, reason);
    }

    private static double? LimitIn(CriterionResult result) =>
        result.Limit is { } limit && string.Equals(limit.Unit, result.Unit, StringComparison.Ordinal) ? limit.Maximum : null;

    private static string? ReferenceTo(AcceptanceLimit? limit) => limit is null ? null : $"{limit.Id}@{limit.Revision}";
}
