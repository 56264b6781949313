using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Sources;

/// <summary>A reference blackbody source of a laboratory.</summary>
/// <param name="Key">What names the source.</param>
/// <param name="Name">Name for people.</param>
/// <param name="Kind">What it is built as.</param>
/// <param name="Route">How its radiance is traceable.</param>
/// <param name="MinimumCelsius">Lowest set point it is used at.</param>
/// <param name="MaximumCelsius">Highest set point it is used at.</param>
/// <param name="Cavity">Geometry and coating.</param>
/// <param name="Bands">Spectral bands it is used in; at least one.</param>
/// <param name="Channels">Its streams of readings, at least one, ids unique.</param>
public sealed record ReferenceSource(
    SourceKey Key,
    string Name,
    SourceKind Kind,
    TraceabilityRoute Route,
    double MinimumCelsius,
    double MaximumCelsius,
    Cavity Cavity,
    IReadOnlyList<WorkingBand> Bands,
    IReadOnlyList<Channel> Channels)
{
    /// <summary>1 for the first description of the source on record, one more for each later one.</summary>
    public int Revision { get; init; } = 1;

    /// <summary>First instant at which this revision holds. The first revision holds for everything before it, too.</summary>
    public Instant EffectiveFrom { get; init; } = Instant.MinValue;

    /// <summary>How an assessment names what it judged: <c>id@revision</c>.</summary>
    public string Reference => $"{Key.Source}@{Revision}";

    /// <summary>Gas that the cavity is purged with, in words; null where it is not purged.</summary>
    public string? PurgeGas { get; init; }

    /// <summary>How it is looked at; null for <see cref="ApertureView.Usual"/>.</summary>
    public ApertureView? View { get; init; }

    /// <summary>Effective emissivities that a drift is told from; empty where none is on record.</summary>
    public IReadOnlyList<EmissivityBaseline> Baselines { get; init; } = [];

    /// <summary>Contributions that the laboratory's own uncertainty budget claims; empty where none is on record.</summary>
    public IReadOnlyList<ClaimedUncertainty> Claimed { get; init; } = [];

    /// <summary>Radiance temperature of the surroundings minus the air temperature, kelvin.</summary>
    public Estimate SurroundingsOffsetKelvin { get; init; } = UsualSurroundingsOffsetKelvin;

    /// <summary>Temperature of a well minus that of the wall beside it, as a part of the difference between well and room.</summary>
    public Estimate WellToWallDrop { get; init; } = UsualWellToWallDrop;

    /// <summary>What the laboratory has laid down for the hazard watch.</summary>
    public HazardLimits Hazards { get; init; } = HazardLimits.None;

    /// <summary>Conditions of the room that its budget holds for; null where none are stated.</summary>
    public PermittedConditions? Conditions { get; init; }

    /// <summary>What its purge has to do; null where nothing is stated.</summary>
    public PurgeRequirement? Purge { get; init; }

    /// <summary>Balances learnt while it was in order, one a channel at most; empty where none is on record.</summary>
    public IReadOnlyList<LearntBalance> Balances { get; init; } = [];

    /// <summary>Taken where nothing is stated about the surroundings (common practice, no source).</summary>
    public static Estimate UsualSurroundingsOffsetKelvin { get; } = new(0, 1.5);

    /// <summary>Taken where nothing is stated about the drop (common practice, no source).</summary>
    public static Estimate UsualWellToWallDrop { get; } = new(0, 1e-4);

    /// <summary>The well thermometer that the source's temperature is taken from; null on a radiometric route without one.</summary>
    public Channel? ReferenceChannel => Channels.FirstOrDefault(channel => channel.IsReference);

    /// <summary>
    /// Whether something that an assessment is about belongs to the source as described here: the source as a whole (an empty scope), a
    /// working band, or a channel.
    /// </summary>
    public bool HasScope(string scope) =>
        scope.Length == 0 || FindChannel(scope) is not null || Bands.Any(band => string.Equals(band.Id, scope, StringComparison.Ordinal));

    /// <summary>The name for people of a band or a channel that an assessment is about; its id where the source does not have it.</summary>
    public string NameOfScope(string scope) =>
        Bands.FirstOrDefault(band => string.Equals(band.Id, scope, StringComparison.Ordinal))?.Name ?? FindChannel(scope)?.Name ?? scope;

    /// <summary>The channel of an id; null where the source has none of that id.</summary>
    public Channel? FindChannel(string id) => Channels.FirstOrDefault(channel => string.Equals(channel.Id, id, StringComparison.Ordinal));
}
