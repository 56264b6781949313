using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Forecasts;
using LabWatch.Lab;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Attribution;

namespace LabWatch.Assessments.Attribution;

/// <summary>
/// Attributes what the comparators of one source show, or those of the sources that share a comparator, by <see cref="DeviationAttribution"/>. Where something
/// has changed, the wells are heard as well: they decide between the thermometer and a gradient that no well sees.
/// </summary>
internal static class Attributions
{
    /// <summary>Most deviations that are weighed together: as many as <c>calc attribution</c> takes.</summary>
    public const int MostDeviations = 16;

    /// <summary>The findings of one source: against its reference days, and against the model.</summary>
    public static IReadOnlyList<AttributionFinding> Of(LabSnapshot snapshot, ReferenceSource source, IReadOnlyList<DriftForecast> forecasts, ICavityModels models)
    {
        Observations observations = new(snapshot, source, forecasts, models);
        return
        [
            Explain("change", [source], Limited(observations.Changes()), observations.Wells()),
            Explain("model", [source], Limited(observations.FromModel()), []),
        ];
    }

    /// <summary>The joint findings of the groups of sources that share a comparator.</summary>
    public static IReadOnlyList<AttributionFinding> Joint(
        LabSnapshot snapshot, IReadOnlyList<(ReferenceSource Source, IReadOnlyList<DriftForecast> Forecasts)> sources, ICavityModels models)
    {
        List<AttributionFinding> findings = [];
        foreach (HashSet<string> group in Groups(snapshot))
        {
            List<Observation> seen = [], wells = [];
            List<ReferenceSource> members = [];
            foreach ((ReferenceSource source, IReadOnlyList<DriftForecast> forecasts) in sources.Where(one => group.Contains(one.Source.Key.Source)))
            {
                Observations observations = new(snapshot, source, forecasts, models);
                seen.AddRange(observations.Changes());
                wells.AddRange(observations.Wells());
                members.Add(source);
            }

            if (members.Count > 1)
            {
                findings.Add(Explain("change", members, Limited(seen), wells));
            }
        }

        return findings;
    }

    private static AttributionFinding Explain(string basis, IReadOnlyList<ReferenceSource> sources, IReadOnlyList<Observation> bands, IReadOnlyList<Observation> wells)
    {
        AttributionResult? result = bands.Count == 0 ? null : DeviationAttribution.Explain([.. bands.Select(one => one.Deviation)]);
        IReadOnlyList<Observation> heard = bands;
        if (result is { Verdict: not AttributionVerdict.NothingToExplain } && wells.Count > 0)
        {
            heard = [.. bands, .. wells.Where(well => bands.Any(band => band.Deviation.Source == well.Deviation.Source)).Take(Math.Max(0, MostDeviations - bands.Count))];
            result = DeviationAttribution.Explain([.. heard.Select(one => one.Deviation)]);
        }

        return new(
            basis,
            [.. sources.Select(source => source.Key)],
            heard,
            result,
            AttributionText.Of(basis, sources, heard, result),
            result is null ? [] : [.. AttributionText.WouldSeparate(result)]);
    }

    /// <summary>The best known first: those with most days.</summary>
    private static IReadOnlyList<Observation> Limited(IReadOnlyList<Observation> observations) =>
        observations.Count <= MostDeviations ? observations : [.. observations.OrderByDescending(one => one.RecentDays + one.ReferenceDays).Take(MostDeviations)];

    /// <summary>Sources joined by an instrument that has been in a comparator channel of both.</summary>
    public static List<HashSet<string>> Groups(LabSnapshot snapshot)
    {
        List<HashSet<string>> groups = [];
        foreach (IGrouping<string, string> shared in snapshot.Installations
            .Where(stay => snapshot.FindChannel(stay.Channel)?.Quantity is ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal)
            .GroupBy(stay => stay.Instrument, stay => stay.Channel.Source.Source, StringComparer.Ordinal))
        {
            HashSet<string> group = [.. shared];
            foreach (HashSet<string> other in groups.Where(other => other.Overlaps(group)).ToList())
            {
                group.UnionWith(other);
                groups.Remove(other);
            }

            groups.Add(group);
        }

        return [.. groups.Where(group => group.Count > 1)];
    }
}
