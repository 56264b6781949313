using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Intake;

/// <summary>A small site for the tests of the intake.</summary>
internal sealed class IntakeLab : ILabSnapshotSource
{
    private LabSnapshot _current;

    public IntakeLab(params Channel[] channels) => _current = Snapshot(channels.Length > 0 ? channels : DefaultChannels());

    public static SourceKey Fir { get; } = new("hollin-vale", "fir");

    public const string Topic = "lab/hollin-vale/fir";

    public LabSnapshot Current
    {
        get => _current;
        set
        {
            _current = value;
            Changed?.Invoke(this, EventArgs.Empty);
        }
    }

    public event EventHandler? Changed;

    public static LabSnapshot Snapshot(params Channel[] channels) => Snapshot([Source(Fir, channels)]);

    public static LabSnapshot Snapshot(SourceKey[] keys) =>
        Snapshot([.. keys.Select(key => Source(key, Channel("power", "W") with { Key = new ChannelKey(key, "power") }))]);

    private static LabSnapshot Snapshot(ReferenceSource[] sources) =>
        new(new LabSite("hollin-vale", "Hollin Vale", "Europe/Dublin"), sources, [], [], [], [], []);

    private static ReferenceSource Source(SourceKey key, params Channel[] channels) => new(
        key,
        key.Source,
        SourceKind.StirredBath,
        TraceabilityRoute.Contact,
        -20,
        90,
        new Cavity(CavityShape.Cylinder, 50, 300, null, 25, [new CoatingOptics("band", Estimate(0.95), Estimate(0.9))]),
        [new WorkingBand("band", "Band", 8, 14)],
        channels);

    public static Channel Channel(string id, string unit, double? minimum = null, double? maximum = null) =>
        new(new ChannelKey(Fir, id), id, ChannelQuantity.WellThermometer, unit, TimeSpan.FromSeconds(1))
        {
            SensorMinimum = minimum,
            SensorMaximum = maximum,
        };

    private static Channel[] DefaultChannels() =>
    [
        Channel("well-1", "Ohm", 10, 400),
        Channel("well-2", "Ohm"),
        Channel("power", "W"),
        Channel("shell", "Cel"),
        Channel("shutter", "/"),
    ];

    private static Estimate Estimate(double value) => new(value, 0.01, double.PositiveInfinity);
}
