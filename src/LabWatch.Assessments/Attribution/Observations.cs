using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Forecasts;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Attribution;

namespace LabWatch.Assessments.Attribution;

/// <summary>Makes the deviations of a source out of what its comparators and wells showed over the days.</summary>
/// <param name="snapshot">What is configured.</param>
/// <param name="source">The source.</param>
/// <param name="forecasts">Its series.</param>
/// <param name="models">Cavity models.</param>
internal sealed class Observations(LabSnapshot snapshot, ReferenceSource source, IReadOnlyList<DriftForecast> forecasts, ICavityModels models)
{
    /// <summary>Taken for the air where the sensitivities need it, degree Celsius: they hardly depend on it.</summary>
    private const double RoomCelsius = 23;

    /// <summary>A day's mean of a comparator repeats no better than this, kelvin (common practice, no source).</summary>
    private const double LeastScatterKelvin = 0.005;

    /// <summary>
    /// By how much of a deviation the effect of a cause may miss its first order: a coating that has aged makes the cavity's response larger, and the profile moves a little
    /// with its thermometer (common practice, no source).
    /// </summary>
    private const double FirstOrderPart = 0.05;

    private const string WellsName = "wells";

    private Instant Newest => forecasts.Where(IsComparator).SelectMany(forecast => forecast.Days).Select(day => day.At).DefaultIfEmpty(Instant.MinValue).Max();

    /// <summary>By how much what each comparator shows has changed since the reference days, at each set point of the last days.</summary>
    public IReadOnlyList<Observation> Changes()
    {
        List<Observation> found = [];
        foreach (IGrouping<string, DayStretches> channel in Stretches(IsComparator).GroupBy(stretches => stretches.Series.Series.Scope))
        {
            double scatter = Math.Max(LeastScatterKelvin, DayStretches.Scatter(channel) / 1000);
            foreach (DayStretches stretches in channel.Where(candidate => candidate.Recent.Count > 0 && candidate.Reference.Count >= DayStretches.LeastReferenceDays))
            {
                double u = scatter * Math.Sqrt((1.0 / stretches.Recent.Count) + (1.0 / stretches.Reference.Count));
                AddTo(found, stretches, (stretches.RecentMean - stretches.ReferenceMean) / 1000, u, stretches.Reference.Count);
            }
        }

        return found;
    }

    /// <summary>
    /// By how much the reference well has changed against the other wells: a thermometer error shows there too, a gradient that no well sees does not. The sign
    /// is that of the deviations: a thermometer that reads high counts as negative.
    /// </summary>
    public IReadOnlyList<Observation> Wells()
    {
        DayStretches[] series = [.. Stretches(forecast => forecast.Series.Quantity == TrackedQuantity.WellDifference)];
        double scatter = Math.Max(LeastScatterKelvin, DayStretches.Scatter(series) / 1000);
        return [.. series
            .Where(candidate => candidate.Recent.Count > 0 && candidate.Reference.Count >= DayStretches.LeastReferenceDays && double.IsFinite(scatter))
            .Select(stretches => new Observation(
                WellDeviation((stretches.ReferenceMean - stretches.RecentMean) / 1000, scatter * Math.Sqrt((1.0 / stretches.Recent.Count) + (1.0 / stretches.Reference.Count))),
                string.Empty, stretches.Series.Series.SetPointCelsius, stretches.Recent.Count, stretches.Reference.Count))];
    }

    /// <summary>
    /// By how much what each comparator shows differs from the model, at the set point of the last days at which most bands were seen. One a band, so that
    /// the certificate of a comparator enters once.
    /// </summary>
    public IReadOnlyList<Observation> FromModel()
    {
        List<DayStretches> recent = [.. Stretches(IsComparator).Where(stretches => stretches.Recent.Count > 0)];
        List<Observation> found = [];
        if (recent.Count == 0)
        {
            return found;
        }

        IGrouping<double, DayStretches> most = recent.GroupBy(stretches => stretches.Series.Series.SetPointCelsius)
            .OrderByDescending(group => group.Count()).ThenByDescending(group => group.Max(stretches => stretches.Recent[^1].At)).First();
        foreach (DayStretches stretches in most)
        {
            double scatter = DayStretches.Scatter(recent.Where(other => other.Series.Series.Scope == stretches.Series.Series.Scope)) / 1000;
            double noise = Math.Max(LeastScatterKelvin, double.IsNaN(scatter) ? 0 : scatter) / Math.Sqrt(stretches.Recent.Count);
            AddTo(found, stretches, stretches.RecentMean / 1000, double.Hypot(noise, CertificateKelvin(stretches)), 0);
        }

        return found;
    }

    private BandDeviation WellDeviation(double kelvin, double u) =>
        new(source.Key.Source, WellsName, WellsName, kelvin, double.Hypot(u, FirstOrderPart * kelvin), 0, 0, 0);

    private static bool IsComparator(DriftForecast forecast) => forecast.Series.Quantity == TrackedQuantity.ComparatorOffset;

    private IEnumerable<DayStretches> Stretches(Func<DriftForecast, bool> which)
    {
        Instant newest = Newest;
        return forecasts.Where(which).Select(forecast => DayStretches.Of(forecast, newest));
    }

    private void AddTo(List<Observation> found, DayStretches stretches, double kelvin, double u, int referenceDays)
    {
        SeriesKey series = stretches.Series.Series;
        WorkingBand? band = source.Bands.FirstOrDefault(candidate => candidate.Id == stretches.Series.Band);
        if (band is null || !double.IsFinite(u) || BandSensitivity.Of(models.ModelOf(source, band), series.SetPointCelsius, RoomCelsius + source.SurroundingsOffsetKelvin.Value) is not { } sensitivity)
        {
            return;
        }

        double surroundings = referenceDays > 0 ? 0 : sensitivity.PerSurroundings * source.SurroundingsOffsetKelvin.StandardUncertainty;
        found.Add(new(
            new BandDeviation(
                source.Key.Source, InstrumentIn(series.Scope, stretches.Recent[^1].At) ?? series.Scope, NameOf(band), kelvin, double.Hypot(double.Hypot(u, surroundings), FirstOrderPart * kelvin), sensitivity.PerEmissivity,
                sensitivity.PerGradient, sensitivity.PerSignal),
            series.Scope,
            series.SetPointCelsius,
            stretches.Recent.Count,
            referenceDays));
    }

    /// <summary>The band by its edges, so that the same band of two sources is the same however each calls it.</summary>
    private static string NameOf(WorkingBand band) => band.LowerMicrometre == band.UpperMicrometre
        ? FormattableString.Invariant($"{band.LowerMicrometre} um")
        : FormattableString.Invariant($"{band.LowerMicrometre}-{band.UpperMicrometre} um");

    private string? InstrumentIn(string channel, Instant at) =>
        snapshot.StaysIn(new ChannelKey(source.Key, channel)).LastOrDefault(stay => stay.Covers(at))?.Instrument;

    private double CertificateKelvin(DayStretches stretches) =>
        snapshot.CertificateInForce(new ChannelKey(source.Key, stretches.Series.Series.Scope), stretches.Recent[^1].At) is { Characteristic: Characteristic characteristic }
            ? characteristic.ExpandedUncertaintyKelvin / characteristic.CoverageFactor
            : double.NaN;
}
