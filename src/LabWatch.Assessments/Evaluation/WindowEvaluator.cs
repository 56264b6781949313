using System.Collections.Concurrent;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>Makes assessments of one window out of what a criterion finds and what it found it in.</summary>
/// <param name="snapshot">What is configured about the site.</param>
/// <param name="source">The source; its revision in force at the end of a window is judged.</param>
/// <param name="criterion">The criterion.</param>
/// <param name="programVersion">Version that provenance names.</param>
internal sealed class WindowEvaluator(LabSnapshot snapshot, SourceKey source, ICriterion criterion, string programVersion)
{
    private readonly ConcurrentDictionary<ReferenceSource, IReadOnlyList<string>> _channels = new(ReferenceEqualityComparer.Instance);

    public ICriterion Criterion => criterion;

    public SourceKey Source => source;

    /// <summary>Whether the criterion applies to any revision of the source.</summary>
    public bool Applies => snapshot.Sources.Concat(snapshot.FormerSources).Any(revision => revision.Key == source && ChannelsOf(revision).Count > 0);

    /// <summary>The source as it is judged in a window.</summary>
    public ReferenceSource SourceIn(TimeWindow window) =>
        snapshot.SourceInForce(source, window.End) ?? throw new InvalidOperationException($"{source} is not on record.");

    /// <summary>The channels to read for a window; empty where the criterion does not apply then.</summary>
    public IReadOnlyList<string> Channels(TimeWindow window) => ChannelsOf(SourceIn(window));

    /// <summary>The channels to read for some windows.</summary>
    public IReadOnlyList<string> Channels(IEnumerable<TimeWindow> windows)
    {
        List<IReadOnlyList<string>> sets = [.. windows.Select(Channels).Distinct()];
        return sets.Count == 1 ? sets[0] : [.. sets.SelectMany(ids => ids).Distinct()];
    }

    /// <summary>The certificates in force for a window, as <c>id@revision</c> in ordinal order.</summary>
    public IReadOnlyList<string> CertificatesInForce(TimeWindow window) => !criterion.RestsOnCertificates
        ? []
        : [.. Channels(window)
            .SelectMany(id => CertificateTimeline.Of(snapshot, new ChannelKey(source, id), criterion.Schedule.SpanOf(window)).References)
            .Distinct()
            .Order(StringComparer.Ordinal)];

    /// <summary>Whether an assessment was made of another description of the source, or with other certificates or another limit than those in force now.</summary>
    public bool InputsDiffer(Assessment assessment)
    {
        ReferenceSource described = SourceIn(assessment.Window);
        if (Withdrawal.Is(assessment) && !described.HasScope(assessment.Scope))
        {
            return false;
        }

        double setPoint = CriterionResult.Figure(assessment.Figures, FigureName.SetPoint);
        double nominal = double.IsNaN(setPoint) ? CriterionResult.Figure(assessment.Figures, FigureName.Mean) : setPoint;
        AcceptanceLimit? limit = LimitLookup.InForce(
            snapshot, source, criterion.Code, nominal, criterion.BandOf(described, assessment.Scope), assessment.Window.End);
        return Supersession.SourceDiffers(assessment.Provenance.Source, described)
            || !string.Equals(assessment.Provenance.Limit, ReferenceTo(limit), StringComparison.Ordinal)
            || !assessment.Provenance.Certificates.SequenceEqual(CertificatesInForce(assessment.Window), StringComparer.Ordinal);
    }

    /// <summary>
    /// Judges a window anew. Empty where no needed channel has a reading in the window, or where the assessments that stand rest on the
    /// same readings, source, certificates and limits; else first revisions, or revisions that supersede, with the reason. A scope that
    /// stands and that the source does not have any more is withdrawn by a revision that decides nothing.
    /// </summary>
    /// <param name="window">The window.</param>
    /// <param name="readings">Readings of the window's channels, and maybe others, over at least the window and its lead-in.</param>
    /// <param name="standing">Highest revisions of this window's assessments, one a scope.</param>
    /// <param name="now">When it is computed.</param>
    public IReadOnlyList<Assessment> Evaluate(TimeWindow window, ReadingWindow readings, IReadOnlyList<Assessment> standing, Instant now)
    {
        ReferenceSource described = SourceIn(window);
        IReadOnlyList<string> channels = ChannelsOf(described);
        ReadingWindow seen = readings.Slice(criterion.Schedule.SpanOf(window), channels);
        bool hasReadings = channels.Count > 0 && seen.Series.Any(series => series.HasReadingIn(window));
        if (!hasReadings && !(channels.Count == 0 && standing.Any(item => !Withdrawal.Is(item))))
        {
            return [];
        }

        string digest = ReadingsDigest.Of(seen);
        if (standing.Count > 0 && standing.All(item => string.Equals(item.Provenance.ReadingsDigest, digest, StringComparison.Ordinal) && !InputsDiffer(item)))
        {
            return [];
        }

        Provenance provenance = new(digest, seen.Hours, CertificatesInForce(window), null, programVersion) { Source = described.Reference };
        IReadOnlyList<CriterionResult> results = channels.Count == 0 ? [] : criterion.Evaluate(new CriterionInput(snapshot, described, window, seen));
        return
        [
            .. results
                .Select(result => Assess(window, result, provenance with { Limit = ReferenceTo(result.Limit) }, Standing(standing, result.Scope), now))
                .OfType<Assessment>(),
            .. standing
                .Where(item => !Withdrawal.Is(item) && !results.Any(result => string.Equals(result.Scope, item.Scope, StringComparison.Ordinal)))
                .Select(item => Withdrawal.Of(item, described, provenance, now)),
        ];
    }

    private IReadOnlyList<string> ChannelsOf(ReferenceSource revision) => _channels.GetOrAdd(revision, criterion.Channels);

    private Assessment? Assess(TimeWindow window, CriterionResult result, Provenance provenance, Assessment? former, Instant now)
    {
        string? reason = former is null ? null : Supersession.Reason(former.Provenance, provenance);
        return former is not null && reason is null
            ? null
            : new Assessment(
                source, criterion.Code, result.Scope, window, (former?.Revision ?? 0) + 1, result.Value, result.Unit, LimitIn(result), result.CoverageFactor,
                result.Decision, result.ConformityProbability, result.Figures, result.Explanation, provenance, now, reason);
    }

    private static Assessment? Standing(IReadOnlyList<Assessment> standing, string scope) =>
        standing.FirstOrDefault(item => string.Equals(item.Scope, scope, StringComparison.Ordinal));

    private static double? LimitIn(CriterionResult result) =>
        result.Limit is { } limit && string.Equals(limit.Unit, result.Unit, StringComparison.Ordinal) ? limit.Maximum : null;

    private static string? ReferenceTo(AcceptanceLimit? limit) => limit is null ? null : $"{limit.Id}@{limit.Revision}";
}
