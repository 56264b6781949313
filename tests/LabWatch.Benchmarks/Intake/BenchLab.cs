using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Benchmarks.Intake;

/// <summary>Sources of 60 channels each, as many as publishers.</summary>
internal sealed class BenchLab(int sources) : ILabSnapshotSource
{
    public const string Site = "hollin-vale";
    public const int Channels = 60;

    public LabSnapshot Current { get; } = new(
        new LabSite(Site, "Hollin Vale", "Europe/Dublin"),
        [.. Enumerable.Range(0, sources).Select(index => Source(new SourceKey(Site, $"source-{index}")))],
        [],
        [],
        [],
        [],
        []);

#pragma warning disable CS0067 // The snapshot of a benchmark never changes.
    public event EventHandler? Changed;
#pragma warning restore CS0067

    private static ReferenceSource Source(SourceKey key) => new(
        key,
        key.Source,
        SourceKind.StirredBath,
        TraceabilityRoute.Contact,
        -20,
        90,
        new Cavity(CavityShape.Cylinder, 50, 300, null, 25, [new CoatingOptics("band", new Estimate(0.95, 0.01), new Estimate(0.9, 0.05))]),
        [new WorkingBand("band", "Band", 8, 14)],
        [
            .. Enumerable.Range(0, Channels).Select(index => new Channel(
                new ChannelKey(key, $"channel-{index}"), $"Channel {index}", ChannelQuantity.HeaterPower, "W", TimeSpan.FromSeconds(1))),
        ]);
}
