namespace LabWatch.Simulator.Sources;

/// <summary>A simulated source: how it is built, controlled, used and instrumented.</summary>
/// <param name="Id">Id in the site.</param>
/// <param name="Cavity">Dimensions.</param>
/// <param name="Heat">Thermal build.</param>
/// <param name="Tuning">Controller.</param>
/// <param name="CutoutCelsius">Temperature at which the independent cut-out trips.</param>
/// <param name="Truth">From what the hidden truth is drawn.</param>
/// <param name="Routine">Its working week.</param>
/// <param name="Channels">Its sensors, in the order in which they are sent.</param>
internal sealed record SourceDesign(
    string Id,
    CavityDesign Cavity,
    HeatDesign Heat,
    PidTuning Tuning,
    double CutoutCelsius,
    TruthDesign Truth,
    SetPointRoutine Routine,
    IReadOnlyList<ChannelDesign> Channels)
{
    /// <summary>Whether it has a shutter (and the channel that shows it).</summary>
    public bool HasShutter => Channels.Any(channel => channel.Role == ChannelRole.Shutter);

    /// <summary>The sensor of an id; null where there is none.</summary>
    public ChannelDesign? Find(string? channel) => Channels.FirstOrDefault(candidate => string.Equals(candidate.Id, channel, StringComparison.Ordinal));
}
