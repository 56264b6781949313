using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;

namespace LabWatch.Assessments.Profiles;

/// <summary>
/// The profile of a source at one instant, from the newest reading of each channel, by the same computation as the criteria: only the
/// scatter within a window is missing from the uncertainties.
/// </summary>
/// <param name="Evidence">Temperatures along the axis and around.</param>
/// <param name="SetPointCelsius">Set point; NaN where unknown.</param>
/// <param name="Curve">Temperature of the wall from the aperture to the bottom: place in millimetres from the aperture plane, degree Celsius.</param>
/// <param name="Bands">What it radiates in each band; empty where no reference temperature is known.</param>
/// <param name="Notes">What was assumed, left out or is missing, as sentences.</param>
public sealed record SourceProfile(
    AxialEvidence Evidence,
    double SetPointCelsius,
    IReadOnlyList<(double PositionMillimetre, double Celsius)> Curve,
    IReadOnlyList<BandProfile> Bands,
    IReadOnlyList<string> Notes)
{
    private const int CurvePoints = 61;
    private const double IceKelvin = 273.15;

    /// <summary>The profile at an instant.</summary>
    /// <param name="snapshot">What is configured about the site.</param>
    /// <param name="source">The source, out of the snapshot.</param>
    /// <param name="newest">The newest readings, at most one a channel; those too old to count are not among them.</param>
    /// <param name="at">The instant.</param>
    /// <param name="models">Cavity models.</param>
    public static SourceProfile Of(LabSnapshot snapshot, ReferenceSource source, IReadOnlyList<Reading> newest, Instant at, ICavityModels models)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(newest);
        ArgumentNullException.ThrowIfNull(models);
        ReadingWindow readings = Window(source, newest, at);
        AxialEvidence evidence = AxialReader.Read(snapshot, source, readings.Window, readings, leastCoverage: 0);
        Channel? channel = source.Channels.FirstOrDefault(candidate => candidate.Quantity is ChannelQuantity.SetPoint);
        double setPoint = SetPointHistory.Of(channel is null ? null : readings.Find(channel.Id)).Celsius;
        double nominal = double.IsFinite(setPoint) ? setPoint : evidence.Reference?.Celsius ?? double.NaN;
        List<string> notes = [.. evidence.Obstacles.Select(obstacle => char.ToUpperInvariant(obstacle[0]) + obstacle[1..] + "."), .. evidence.Notes()];
        List<BandProfile> bands = [];
        foreach (WorkingBand band in source.Bands)
        {
            BandModel model = models.ModelOf(source, band);
            notes.AddRange(model.Problems);
            if (BandRadianceEvaluation.Of(model, evidence) is { } radiance)
            {
                bands.Add(new(radiance, Baseline.Of(source, model, radiance.Isothermal, nominal, at), [.. Comparators(snapshot, radiance, nominal, at)]));
            }
        }

        return new(evidence, setPoint, CurveOf(evidence), bands, notes);
    }

    private static IEnumerable<ComparatorProfile> Comparators(LabSnapshot snapshot, BandRadiance radiance, double nominal, Instant at)
    {
        AxialEvidence evidence = radiance.Evidence;
        string band = radiance.Model.Band.Id;
        AcceptanceLimit? limit = LimitLookup.InForce(snapshot, evidence.Source.Key, CriterionCode.EffectiveEmissivity, nominal, band, at);
        foreach (ComparatorPoint point in evidence.Comparators.Where(point => string.Equals(point.Channel.Band, band, StringComparison.Ordinal)))
        {
            ComparatorEmissivity? found = point.Refusal is null ? ComparatorEmissivity.Of(radiance, point) : null;
            yield return new(point, found, point.Refusal ?? found?.CannotTell(limit, evidence.Surroundings));
        }
    }

    private static ReadingWindow Window(ReferenceSource source, IReadOnlyList<Reading> newest, Instant at)
    {
        Instant first = at, last = at;
        List<ReadingSeries> series = [];
        foreach (Reading reading in newest)
        {
            first = reading.Time < first ? reading.Time : first;
            last = reading.Time > last ? reading.Time : last;
            series.Add(new(reading.Channel, new[] { reading.Time.Microseconds }, new[] { reading.Value }, new[] { reading.Quality }));
        }

        return new(source.Key, new TimeWindow(first, new Instant(last.Microseconds + 1)), series, Array.Empty<SourceHourRead>());
    }

    private static (double, double)[] CurveOf(AxialEvidence evidence)
    {
        double top = evidence.Cavity.ApertureHeight, radius = evidence.Cavity.Geometry.Radius;
        if (evidence.Wells.Count == 0 || !(top > 0) || evidence.Cavity.Problems().Count > 0)
        {
            return [];
        }

        Zone[] places = [.. Enumerable.Range(0, CurvePoints).Select(i => new Zone(CavitySurface.Wall, 1, top * (CurvePoints - 1 - i) / (CurvePoints - 1) / radius))];
        double[] kelvin = new double[CurvePoints];
        Estimate drop = evidence.Source.WellToWallDrop;
        new AxialField(evidence, places, toLip: evidence.Lip is not null).Fill(
            [.. evidence.Wells.Select(well => well.Celsius)], evidence.Lip?.Celsius ?? double.NaN, drop.Value, evidence.Surroundings.AirCelsius, kelvin);
        return [.. kelvin.Select((value, i) => (top * i / (CurvePoints - 1), value - IceKelvin))];
    }
}
