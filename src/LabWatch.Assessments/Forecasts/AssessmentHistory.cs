using System.Collections.Concurrent;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Records.Assessments;

namespace LabWatch.Assessments.Forecasts;

/// <summary>
/// What the assessments of a source say over time, read from the records when somebody asks and kept for some minutes: only what is followed is kept,
/// and a source that nobody looks at costs nothing.
/// </summary>
/// <param name="ledger">The assessments.</param>
/// <param name="snapshots">What is configured.</param>
/// <param name="clock">Clock.</param>
public sealed class AssessmentHistory(IAssessmentLedger ledger, ILabSnapshotSource snapshots, TimeProvider clock) : IDisposable
{
    private const int PageLength = 2000;
    private static readonly TimeSpan KeepFor = TimeSpan.FromMinutes(5);
    private static readonly TimeSpan DropAfter = TimeSpan.FromMinutes(30);

    private readonly ConcurrentDictionary<SourceKey, Kept> _kept = new();
    private readonly SemaphoreSlim _reading = new(1, 1);

    /// <summary>How far back assessments are looked at.</summary>
    public static TimeSpan Reach { get; } = TimeSpan.FromDays(400);

    /// <summary>The forecasts of a source as they stand, the soonest crossing first; none for a source that is not on record.</summary>
    public ValueTask<IReadOnlyList<DriftForecast>> ForecastsAsync(SourceKey source, CancellationToken cancellationToken) =>
        ForecastsAsync(source, null, cancellationToken);

    /// <summary>The forecasts of a source as they stood when a window ended, from the assessments on record now.</summary>
    /// <param name="source">The source.</param>
    /// <param name="upTo">End of the window; null for now.</param>
    /// <param name="cancellationToken">Stops the reading.</param>
    public async ValueTask<IReadOnlyList<DriftForecast>> ForecastsAsync(SourceKey source, Instant? upTo, CancellationToken cancellationToken)
    {
        if (snapshots.Current.FindSource(source) is not { } described)
        {
            return [];
        }

        Kept kept = await PointsAsync(described, cancellationToken).ConfigureAwait(false);
        return upTo is null ? kept.Forecasts.Value : DriftForecasts.Of(described, kept.Points, upTo);
    }

    /// <summary>The newest decided assessments of a source by a criterion, one a scope and set point.</summary>
    public async ValueTask<IReadOnlyList<Assessment>> NewestDecidedAsync(SourceKey source, string criterion, CancellationToken cancellationToken) =>
        snapshots.Current.FindSource(source) is { } described
            ? [.. (await PointsAsync(described, cancellationToken).ConfigureAwait(false)).Newest.Where(pair => pair.Key.Criterion == criterion).Select(pair => pair.Value)]
            : [];

    /// <inheritdoc/>
    public void Dispose() => _reading.Dispose();

    private async ValueTask<Kept> PointsAsync(ReferenceSource source, CancellationToken cancellationToken)
    {
        if (Fresh(source) is { } known)
        {
            return known;
        }

        // One source at a time: a page that asks for all of them must not take the records from the planner.
        await _reading.WaitAsync(cancellationToken).ConfigureAwait(false);
        try
        {
            if (Fresh(source) is { } meanwhile)
            {
                return meanwhile;
            }

            List<TrackedPoint> points = [];
            Dictionary<(string, string, double), Assessment> newest = [];
            foreach (string criterion in TrackedPoints.Criteria)
            {
                await foreach (Assessment assessment in ReadAsync(source.Key, criterion, Reach, cancellationToken).ConfigureAwait(false))
                {
                    points.AddRange(TrackedPoints.Of(source, assessment));
                    if (assessment.Decision is not Decision.NotDecided)
                    {
                        newest.TryAdd((criterion, assessment.Scope, Math.Round(CriterionResult.Figure(assessment.Figures, FigureName.SetPoint), 1)), assessment);
                    }
                }
            }

            Kept read = new(source, clock.GetTimestamp(), points, newest);
            _kept[source.Key] = read;
            foreach ((SourceKey key, Kept old) in _kept)
            {
                if (clock.GetElapsedTime(old.ReadAt) > DropAfter)
                {
                    _kept.TryRemove(key, out _);
                }
            }

            return read;
        }
        finally
        {
            _reading.Release();
        }
    }

    /// <summary>The highest revisions of a criterion over the last days, newest window first.</summary>
    internal async IAsyncEnumerable<Assessment> ReadAsync(
        SourceKey source, string criterion, TimeSpan reach, [System.Runtime.CompilerServices.EnumeratorCancellation] CancellationToken cancellationToken)
    {
        Instant now = Instant.Now(clock);
        string? after = null;
        do
        {
            AssessmentPage page = await ledger.ListAsync(
                new AssessmentQuery(source, criterion, new TimeWindow(now - reach, now + TimeSpan.FromHours(1)), after, PageLength), cancellationToken).ConfigureAwait(false);
            foreach (Assessment assessment in page.Items)
            {
                yield return assessment;
            }

            after = page.Next;
        }
        while (after is not null);
    }

    private Kept? Fresh(ReferenceSource source) =>
        _kept.TryGetValue(source.Key, out Kept? kept) && ReferenceEquals(kept.Source, source) && clock.GetElapsedTime(kept.ReadAt) < KeepFor ? kept : null;

    private sealed record Kept(ReferenceSource Source, long ReadAt, IReadOnlyList<TrackedPoint> Points, IReadOnlyDictionary<(string Criterion, string Scope, double SetPoint), Assessment> Newest)
    {
        public Lazy<IReadOnlyList<DriftForecast>> Forecasts { get; } = new(() => DriftForecasts.Of(Source, Points));
    }
}
