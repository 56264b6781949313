using LabWatch.Assessments.Profiles;
using LabWatch.Lab;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Sources;

/// <summary>Makes the answer of a profile.</summary>
internal static class ProfileViews
{
    /// <summary>The answer.</summary>
    /// <param name="lab">What is configured.</param>
    /// <param name="profile">The profile.</param>
    /// <param name="newest">The newest readings by channel, those that are too old included.</param>
    /// <param name="at">The instant.</param>
    public static ProfileView Of(LabSnapshot lab, SourceProfile profile, IReadOnlyDictionary<string, Reading> newest, Instant at)
    {
        ReferenceSource source = profile.Evidence.Source;
        return new(
            source.Key.ToString(),
            at,
            Numbers.OrNull(profile.SetPointCelsius),
            profile.Evidence.Reference is { } reference ? new(reference.Celsius, 2 * reference.CalibrationKelvin, 2) : null,
            [.. source.Channels.Where(channel => KindOf(channel) is not null).Select(channel => Point(lab, source, channel, newest, at))],
            [.. profile.Curve.Select(point => new CurvePointView(point.PositionMillimetre, point.Celsius))],
            [.. profile.Bands.Select(Band)],
            profile.Notes);
    }

    private static string? KindOf(Channel channel) => channel.Quantity switch
    {
        ChannelQuantity.WellThermometer => "well",
        ChannelQuantity.ApertureLip => "lip",
        ChannelQuantity.OuterSurface => "case",
        _ => null,
    };

    private static ProfilePointView Point(LabSnapshot lab, ReferenceSource source, Channel channel, IReadOnlyDictionary<string, Reading> newest, Instant at)
    {
        bool isKnown = newest.TryGetValue(channel.Id, out Reading reading);
        TemperatureView? temperature = isKnown && (reading.Quality & (ReadingQuality.NoValue | ReadingQuality.OutsideSensorRange)) == 0
            ? Temperatures.Of(lab, source, channel, newest)
            : null;
        return new(
            channel.Id,
            channel.Name,
            KindOf(channel)!,
            channel.AxialPositionMillimetre,
            temperature?.Celsius,
            temperature?.ExpandedUncertaintyKelvin,
            temperature?.CoverageFactor,
            channel.IsReference,
            !isKnown || Silence.IsSilent(channel, reading.Time, at));
    }

    private static BandProfileView Band(BandProfile band)
    {
        BandRadiance radiance = band.Radiance;
        Estimate offset = radiance.OffsetKelvin;
        return new(
            radiance.Model.Band.Id,
            radiance.Model.Band.Name,
            radiance.Model.Method,
            Expanded(radiance.EffectiveEmissivity),
            Expanded(radiance.Isothermal),
            radiance.RadianceCelsius.Value,
            Expanded(radiance.RadianceCelsius),
            Expanded(new(offset.Value * 1000, offset.StandardUncertainty * 1000, offset.DegreesOfFreedom)),
            radiance.Evidence.Surroundings.RadianceCelsius.Value,
            [.. band.Comparators.Select(Comparator)],
            band.Baseline.IsDesignValue
                ? null
                : new(band.Baseline.EffectiveEmissivity.Value, 2 * band.Baseline.EffectiveEmissivity.StandardUncertainty, band.Baseline.From));
    }

    private static ComparatorProfileView Comparator(ComparatorProfile comparator) => new(
        comparator.Point.Channel.Id,
        comparator.Point.Channel.Name,
        Numbers.OrNull(comparator.Point.Celsius.Value),
        comparator.Emissivity is { } found ? Expanded(found.EffectiveEmissivity) : null,
        comparator.Point.ShowsChangeOnly,
        comparator.Refusal);

    private static EstimateView Expanded(Estimate estimate)
    {
        double factor = CoverageFactor.For(estimate.DegreesOfFreedom);
        return new(estimate.Value, factor * estimate.StandardUncertainty, factor);
    }
}
