using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.SystemTests.Intake;

/// <summary>A laboratory of one source with one channel, which never changes.</summary>
internal sealed class FixedLab : ILabSnapshotSource
{
    public LabSnapshot Current { get; } = Snapshot();

#pragma warning disable CS0067 // It never changes.
    public event EventHandler? Changed;
#pragma warning restore CS0067

    public static LabSnapshot Snapshot() => new(
        new LabSite("hollin-vale", "Hollin Vale", "Europe/Dublin"),
        [
            new ReferenceSource(
                IntakeHost.Fir,
                "Fir",
                SourceKind.StirredBath,
                TraceabilityRoute.Contact,
                -20,
                90,
                new Cavity(CavityShape.Cylinder, 50, 300, null, 25, [new CoatingOptics("band", new Estimate(0.95, 0.01), new Estimate(0.9, 0.05))]),
                [new WorkingBand("band", "Band", 8, 14)],
                [new Channel(new ChannelKey(IntakeHost.Fir, "power"), "Power", ChannelQuantity.HeaterPower, "W", TimeSpan.FromSeconds(1))]),
        ],
        [],
        [],
        [],
        [],
        []);
}
