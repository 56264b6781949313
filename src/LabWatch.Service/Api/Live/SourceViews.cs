using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Sources as configured, as the API shows them.</summary>
internal static class SourceViews
{
    /// <summary>A source with what is known about it now.</summary>
    public static SourceView Of(ReferenceSource source, SourceStatusView status) => new(
        source.Key.ToString(),
        source.Key.Site,
        source.Key.Source,
        source.Name,
        Names.Of(source.Kind),
        Names.Of(source.Route),
        source.MinimumCelsius,
        source.MaximumCelsius,
        source.PurgeGas,
        Of(source.Cavity),
        Of(source.View ?? ApertureView.Usual(source.Cavity.ApertureRadiusMillimetre), source.View is not null),
        [.. source.Bands.Select(band => new BandView(band.Id, band.Name, band.LowerMicrometre, band.UpperMicrometre))],
        [.. source.Channels.Select(Of)],
        status);

    /// <summary>The instruments in a source's channels at an instant.</summary>
    public static IReadOnlyList<InstallationView> Instruments(LabSnapshot lab, ReferenceSource source, Instant at) =>
    [
        .. lab.Installations
            .Where(stay => stay.Channel.Source == source.Key && stay.Covers(at))
            .Select(stay => Of(lab, stay, at)),
    ];

    /// <summary>The acceptance limits of a source in force at an instant: of each limit its latest revision.</summary>
    public static IReadOnlyList<LimitView> Limits(LabSnapshot lab, ReferenceSource source, Instant at) =>
    [
        .. lab.Limits
            .Where(limit => limit.Source == source.Key && limit.EffectiveFrom <= at && !(limit.WithdrawnFrom <= at))
            .GroupBy(limit => limit.Id, StringComparer.Ordinal)
            .Select(revisions => revisions.MaxBy(limit => (limit.EffectiveFrom, limit.Revision))!)
            .Select(Of),
    ];

    private static CavityView Of(Cavity cavity) => new(
        Names.Of(cavity.Shape), cavity.RadiusMillimetre, cavity.LengthMillimetre, cavity.ConeHalfAngleDegree, cavity.ApertureRadiusMillimetre,
        [.. cavity.Coating.Select(Of)],
        Names.Of(cavity.SecondMaterial));

    private static ApertureViewView Of(ApertureView view, bool isStated) => new(Names.Of(view.Kind), view.SpotRadiusMillimetre, view.DistanceMillimetre, isStated);

    private static CoatingView Of(CoatingOptics coating) => new(
        coating.Band,
        coating.Emissivity.Value,
        Numbers.OrNull(coating.Emissivity.StandardUncertainty),
        coating.DiffuseFraction.Value,
        Numbers.OrNull(coating.DiffuseFraction.StandardUncertainty),
        coating.SecondEmissivity?.Value,
        coating.SecondEmissivity is { } second ? Numbers.OrNull(second.StandardUncertainty) : null);

    private static ChannelView Of(Channel channel) => new(
        channel.Id,
        channel.Name,
        Names.Of(channel.Quantity),
        channel.Unit,
        channel.Interval.TotalSeconds,
        channel.AxialPositionMillimetre,
        channel.IsReference,
        channel.IsTouchable,
        channel.IsHazardChannel || channel.IsTouchable,
        channel.Band,
        TouchLimits.HotCelsius(channel));

    private static InstallationView Of(LabSnapshot lab, Installation stay, Instant at)
    {
        Instrument? instrument = lab.Instruments.FirstOrDefault(candidate => string.Equals(candidate.Id, stay.Instrument, StringComparison.Ordinal));
        Certificate? certificate = lab.CertificateInForce(stay.Channel, at);
        return new InstallationView(
            stay.Channel.Channel,
            stay.Instrument,
            instrument?.SerialNumber ?? string.Empty,
            instrument?.Description ?? string.Empty,
            stay.From,
            certificate is null ? null : RecordNames.Of(certificate),
            certificate?.Number,
            certificate?.Issuer,
            certificate?.ValidFrom,
            certificate?.DueAt);
    }

    private static LimitView Of(AcceptanceLimit limit) => new(
        RecordNames.Of(limit),
        limit.Criterion,
        limit.Maximum,
        limit.Unit,
        Names.Of(limit.Rule),
        limit.MinimumCelsius,
        limit.MaximumCelsius,
        limit.Band,
        limit.EffectiveFrom);
}
