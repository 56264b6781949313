using System.Collections.Frozen;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Lab;

/// <summary>
/// Everything that is configured about a site, as one immutable value: what the hazard watch needs without a database, and what an
/// assessment was made with. Built only from validated input, so that ids resolve and stays do not overlap.
/// </summary>
public sealed class LabSnapshot
{
    private readonly FrozenDictionary<SourceKey, ReferenceSource> _sources;
    private readonly FrozenDictionary<ChannelKey, Channel> _channels;
    private readonly FrozenDictionary<ChannelKey, Installation[]> _stays;
    private readonly FrozenDictionary<string, Certificate[]> _certificates;
    private readonly FrozenDictionary<SourceKey, AcceptanceLimit[]> _limits;

    /// <summary>Makes a snapshot of validated parts.</summary>
    public LabSnapshot(
        LabSite site,
        IReadOnlyList<ReferenceSource> sources,
        IReadOnlyList<Instrument> instruments,
        IReadOnlyList<Installation> installations,
        IReadOnlyList<Certificate> certificates,
        IReadOnlyList<AcceptanceLimit> limits,
        IReadOnlyList<Notifier> notifiers)
    {
        Site = site;
        Sources = sources;
        Instruments = instruments;
        Installations = installations;
        Certificates = certificates;
        Limits = limits;
        Notifiers = notifiers;
        _sources = sources.ToFrozenDictionary(source => source.Key);
        _channels = sources.SelectMany(source => source.Channels).ToFrozenDictionary(channel => channel.Key);
        _stays = installations.GroupBy(stay => stay.Channel).ToFrozenDictionary(group => group.Key, group => group.ToArray());
        _certificates = certificates.GroupBy(certificate => certificate.Instrument, StringComparer.Ordinal)
            .ToFrozenDictionary(group => group.Key, group => group.ToArray(), StringComparer.Ordinal);
        _limits = limits.GroupBy(limit => limit.Source).ToFrozenDictionary(group => group.Key, group => group.ToArray());
    }

    /// <summary>The site.</summary>
    public LabSite Site { get; }

    /// <summary>The sources, in the order of the lab file.</summary>
    public IReadOnlyList<ReferenceSource> Sources { get; }

    /// <summary>The instruments.</summary>
    public IReadOnlyList<Instrument> Instruments { get; }

    /// <summary>Which instrument was in which channel when.</summary>
    public IReadOnlyList<Installation> Installations { get; }

    /// <summary>All revisions of all certificates.</summary>
    public IReadOnlyList<Certificate> Certificates { get; }

    /// <summary>All revisions of all triple-point checks of resistance thermometers.</summary>
    public IReadOnlyList<TriplePointCheck> TriplePointChecks { get; init; } = [];

    /// <summary>All revisions of all acceptance limits.</summary>
    public IReadOnlyList<AcceptanceLimit> Limits { get; }

    /// <summary>The ways to tell somebody.</summary>
    public IReadOnlyList<Notifier> Notifiers { get; }

    /// <summary>Earlier revisions of the sources, and the last ones of sources that were withdrawn. None of them is watched.</summary>
    public IReadOnlyList<ReferenceSource> FormerSources { get; init; } = [];

    /// <summary>The source of a key; null where there is none.</summary>
    public ReferenceSource? FindSource(SourceKey key) => _sources.GetValueOrDefault(key);

    /// <summary>
    /// The revision of a source in force at an instant: of those effective from then or before the latest, in its highest revision. Before
    /// the first revision's date that one holds: nothing older is known. Null where the source was never on record.
    /// </summary>
    public ReferenceSource? SourceInForce(SourceKey key, Instant at)
    {
        if (FormerSources.Count == 0)
        {
            return FindSource(key);
        }

        IEnumerable<ReferenceSource> revisions = Sources.Concat(FormerSources).Where(source => source.Key == key);
        return revisions
            .Where(source => source.EffectiveFrom <= at)
            .OrderByDescending(source => source.EffectiveFrom)
            .ThenByDescending(source => source.Revision)
            .FirstOrDefault()
            ?? revisions.MinBy(source => source.Revision);
    }

    /// <summary>The channel of a key; null where there is none.</summary>
    public Channel? FindChannel(ChannelKey key) => _channels.GetValueOrDefault(key);

    /// <summary>The stays of instruments in a channel; empty where there was none.</summary>
    public IReadOnlyList<Installation> StaysIn(ChannelKey channel) => _stays.GetValueOrDefault(channel, []);

    /// <summary>All revisions of all certificates of an instrument; empty where it has none.</summary>
    public IReadOnlyList<Certificate> CertificatesOf(string instrument) => _certificates.GetValueOrDefault(instrument, []);

    /// <summary>
    /// The certificate in force for a channel at an instant: of the instrument installed then, the latest one valid from then or before,
    /// in its highest revision. Null where no instrument is installed or it has no certificate yet. That of a standard resistance thermometer
    /// carries the R(TPW) in force, where a triple-point check was recorded since its calibration.
    /// </summary>
    public Certificate? CertificateInForce(ChannelKey channel, Instant at)
    {
        Installation? stay = StaysIn(channel).FirstOrDefault(candidate => candidate.Covers(at));
        Certificate? certificate = stay is null
            ? null
            : CertificatesOf(stay.Instrument)
                .Where(certificate => certificate.ValidFrom <= at && !(certificate.WithdrawnFrom <= at))
                .OrderByDescending(certificate => certificate.ValidFrom)
                .ThenByDescending(certificate => certificate.Revision)
                .FirstOrDefault();
        return certificate?.Characteristic is SprtCharacteristic && TriplePointInForce(certificate.Instrument, at) is { } check && check.At >= certificate.ValidFrom
            ? certificate with { TriplePoint = check }
            : certificate;
    }

    /// <summary>
    /// The R(TPW) in force for an instrument at an instant: of its checks up to then the latest, in its highest revision; null where there is none.
    /// </summary>
    public TriplePointCheck? TriplePointInForce(string instrument, Instant at) =>
        TriplePointChecks
            .Where(check => string.Equals(check.Instrument, instrument, StringComparison.Ordinal) && check.At <= at && !(check.WithdrawnFrom <= at))
            .OrderByDescending(check => check.At)
            .ThenByDescending(check => check.Revision)
            .FirstOrDefault();

    /// <summary>
    /// The acceptance limit in force for a source, criterion and set point at an instant, in its highest revision; null where there is none.
    /// A limit for the given band goes before one for all bands.
    /// </summary>
    public AcceptanceLimit? LimitInForce(SourceKey source, string criterion, double? setPointCelsius, string? band, Instant at) =>
        _limits.GetValueOrDefault(source, [])
            .Where(limit => string.Equals(limit.Criterion, criterion, StringComparison.Ordinal)
                && limit.EffectiveFrom <= at
                && !(limit.WithdrawnFrom <= at)
                && (limit.Band is null || string.Equals(limit.Band, band, StringComparison.Ordinal))
                && (limit.MinimumCelsius is not { } minimum || setPointCelsius >= minimum)
                && (limit.MaximumCelsius is not { } maximum || setPointCelsius <= maximum))
            .OrderByDescending(limit => limit.Band is not null)
            .ThenByDescending(limit => limit.EffectiveFrom)
            .ThenByDescending(limit => limit.Revision)
            .FirstOrDefault();
}
