using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>A small invented laboratory with one source of each look: bath, block furnace, graphite tube, fixed reference.</summary>
internal sealed class SampleLab : ILabSnapshotSource
{
    public const string Site = "hollin-vale";

    // Coefficients of IEC 60751:2022, clause 5.
    private const double A = 3.9083e-3;
    private const double B = -5.775e-7;
    private const double C = -4.183e-12;

    private static readonly Instant Start = new(1_700_000_000_000_000);

    public static SourceKey Fir { get; } = new(Site, "fir");

    public static SourceKey Rowan { get; } = new(Site, "rowan");

    public static SourceKey Hazel { get; } = new(Site, "hazel");

    public LabSnapshot Current { get; } = Make();

    public event EventHandler? Changed
    {
        add { }
        remove { }
    }

    private static LabSnapshot Make()
    {
        ReferenceSource[] sources =
        [
            Source("fir", "Fir", SourceKind.StirredBath, TraceabilityRoute.Contact, -20, 90, new(CavityShape.CylinderInwardCone, 30, 230, 60, 25, [new("lwir", new(0.955, 0.006), new(0.94, 0.03))]), "Ohm", [225, 120, 30], "dry nitrogen", "lwir"),
            Source("rowan", "Rowan", SourceKind.BlockFurnace, TraceabilityRoute.Contact, 100, 500, new(CavityShape.CylinderOutwardCone, 25, 200, 60, 20, []), "Ohm", [195, 110, 30], null, "lwir"),
            Source("yew", "Yew", SourceKind.GraphiteTube, TraceabilityRoute.Radiometric, 800, 1500, new(CavityShape.Cylinder, 15, 260, null, 10, []), "Cel", [250, 140, 40], "argon", "nir"),
            Source("hazel", "Hazel", SourceKind.FixedReference, TraceabilityRoute.Contact, 36, 38, new(CavityShape.Sphere, 30, 0, null, 10, [new("lwir", new(0.95, 0.01), new(1, 0))]), "Ohm", [55, 10], null, "lwir"),
        ];
        Channel[] wells = [.. sources.SelectMany(source => source.Channels).Where(channel => channel.Quantity == ChannelQuantity.WellThermometer)];
        return new LabSnapshot(
            new LabSite(Site, "Hollin Vale", "Europe/Dublin"),
            sources,
            [.. wells.Select(Instrument)],
            [.. wells.Select(well => new Installation(InstrumentId(well), well.Key, Start, null))],
            [.. wells.Select(Certificate)],
            [.. sources.Select(source => new AcceptanceLimit(
                source.Key.Source + "-stability", 1, source.Key, CriterionCode.Stability, 20, "mK", DecisionRule.GuardBand, Start))],
            []);
    }

    private static string InstrumentId(Channel well) => well.Key.Source.Source + "-" + well.Id;

    private static Instrument Instrument(Channel well) => new(InstrumentId(well), "HV-" + InstrumentId(well), "Thermometer of " + well.Name);

    private static Certificate Certificate(Channel well)
    {
        Characteristic characteristic = well.Unit == "Ohm"
            ? new CallendarVanDusenCharacteristic(0.02, 2, 100, A, B, C)
            : new CorrectionTableCharacteristic(1.2, 2, [new CorrectionPoint(700, 0.4), new CorrectionPoint(1600, 0.9)]);
        return new Certificate("cert-" + InstrumentId(well), 2, InstrumentId(well), "HV 2026-01", "Hollin Vale", Start, null, -40, 1600, characteristic);
    }

    private static ReferenceSource Source(
        string id, string name, SourceKind kind, TraceabilityRoute route, double low, double high, Cavity cavity, string unit, double[] wells, string? purge, string band)
    {
        SourceKey key = new(Site, id);
        List<Channel> channels = [];
        for (int i = 0; i < wells.Length; i++)
        {
            channels.Add(new Channel(new ChannelKey(key, "well-" + (char)('a' + i)), "Well " + (char)('A' + i), ChannelQuantity.WellThermometer, unit, TimeSpan.FromSeconds(1))
            {
                AxialPositionMillimetre = wells[i],
                IsReference = i == 0,
            });
        }

        channels.Add(new Channel(new ChannelKey(key, "set-point"), "Set point", ChannelQuantity.SetPoint, "Cel", TimeSpan.FromSeconds(1)));
        channels.Add(new Channel(new ChannelKey(key, "heater"), "Heater power", ChannelQuantity.HeaterPower, "W", TimeSpan.FromSeconds(1)));
        channels.Add(new Channel(new ChannelKey(key, "case"), "Outer case", ChannelQuantity.OuterSurface, "Cel", TimeSpan.FromSeconds(1))
        {
            Contact = new SurfaceContact(SurfaceMaterial.CoatedMetal, TimeSpan.FromMinutes(1), 48),
            IsHazardChannel = true,
        });
        channels.Add(new Channel(new ChannelKey(key, "lip"), "Aperture lip", ChannelQuantity.ApertureLip, "Cel", TimeSpan.FromSeconds(1)) { AxialPositionMillimetre = 0 });
        channels.Add(new Channel(new ChannelKey(key, "ambient"), "Room air", ChannelQuantity.AmbientTemperature, "Cel", TimeSpan.FromSeconds(1)));
        if (purge is not null)
        {
            channels.Add(new Channel(new ChannelKey(key, "purge-flow"), "Purge flow", ChannelQuantity.PurgeFlow, "l/min", TimeSpan.FromSeconds(1)));
        }

        WorkingBand[] bands = [band == "nir" ? new WorkingBand("nir", "0.9 µm", 0.9, 0.9) : new WorkingBand("lwir", "8–14 µm", 8, 14)];
        return new ReferenceSource(key, name, kind, route, low, high, cavity, bands, channels) { PurgeGas = purge };
    }
}
