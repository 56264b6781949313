using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Forecasts;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Records.Assessments;

namespace LabWatch.Assessments.Attribution;

/// <summary>Reads what an attribution rests on, and makes it.</summary>
/// <param name="history">What the assessments say over time.</param>
/// <param name="ledger">The assessments.</param>
/// <param name="models">Cavity models.</param>
public sealed class AttributionReader(AssessmentHistory history, IAssessmentLedger ledger, ICavityModels models)
{
    /// <summary>The findings of one source.</summary>
    public async ValueTask<IReadOnlyList<AttributionFinding>> OfAsync(LabSnapshot snapshot, ReferenceSource source, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(source);
        IReadOnlyList<DriftForecast> forecasts = await history.ForecastsAsync(source.Key, cancellationToken).ConfigureAwait(false);
        return await Task.Run(() => Attributions.Of(snapshot, source, forecasts, models), cancellationToken).ConfigureAwait(false);
    }

    /// <summary>The joint findings of the groups of sources that share a comparator; none where none is shared.</summary>
    public async ValueTask<IReadOnlyList<AttributionFinding>> JointAsync(LabSnapshot snapshot, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(snapshot);
        List<(ReferenceSource, IReadOnlyList<DriftForecast>)> all = [];
        HashSet<string> sharing = [.. Attributions.Groups(snapshot).SelectMany(group => group)];
        foreach (ReferenceSource source in snapshot.Sources.Where(source => sharing.Contains(source.Key.Source)))
        {
            all.Add((source, await history.ForecastsAsync(source.Key, cancellationToken).ConfigureAwait(false)));
        }

        return await Task.Run(() => Attributions.Joint(snapshot, all, models), cancellationToken).ConfigureAwait(false);
    }

    /// <summary>Which coatings explain what each comparator of a source last showed.</summary>
    public async ValueTask<IReadOnlyList<CoatingInference>> CoatingsAsync(ReferenceSource source, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(source);
        List<CoatingInference> found = [];
        IReadOnlyList<Assessment> newest = await history.NewestDecidedAsync(source.Key, CriterionCode.EffectiveEmissivity, cancellationToken).ConfigureAwait(false);
        foreach (Assessment comparator in newest.GroupBy(one => one.Scope).Select(group => group.MaxBy(one => one.Window.End)!))
        {
            if (source.FindChannel(comparator.Scope)?.Band is { } id && source.Bands.FirstOrDefault(band => band.Id == id) is { } band
                && await ledger.FindAsync(source.Key, CriterionCode.EffectiveEmissivity, id, comparator.Window, cancellationToken).ConfigureAwait(false) is { } byModel
                && CoatingInference.Of(models.ModelOf(source, band), comparator, byModel) is { } inference)
            {
                found.Add(inference);
            }
        }

        return found;
    }
}
