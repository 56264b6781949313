using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;

namespace LabWatch.Tests.Alerts;

/// <summary>One source with every kind of channel that hazards are judged by, all at ease until a test changes a value.</summary>
internal sealed class HazardBench
{
    public static readonly Dictionary<string, (ChannelQuantity Quantity, string Unit, double AtEase)> Channels = new()
    {
        ["well-1"] = (ChannelQuantity.WellThermometer, "Cel", 25),
        ["well-2"] = (ChannelQuantity.WellThermometer, "Cel", 25),
        ["set-point"] = (ChannelQuantity.SetPoint, "Cel", 25),
        ["heater"] = (ChannelQuantity.HeaterPower, "kW", 0),
        ["purge"] = (ChannelQuantity.PurgeFlow, "l/min", 4),
        ["cooling"] = (ChannelQuantity.CoolingFlow, "l/s", 0.07),
        ["dew-point"] = (ChannelQuantity.DewPoint, "Cel", -30),
        ["case"] = (ChannelQuantity.OuterSurface, "Cel", 25),
        ["ambient"] = (ChannelQuantity.AmbientTemperature, "Cel", 23),
        ["humidity"] = (ChannelQuantity.RelativeHumidity, "%RH", 40),
        ["oxygen"] = (ChannelQuantity.RoomOxygen, "/", 0.209),
        ["level"] = (ChannelQuantity.BathLevel, "%", 95),
        ["stirrer"] = (ChannelQuantity.StirrerSpeed, "1/min", 700),
        ["cut-out"] = (ChannelQuantity.OverTemperatureCutout, "/", 0),
    };

    private readonly Dictionary<string, double> _values = Channels.ToDictionary(pair => pair.Key, pair => pair.Value.AtEase);

    public HazardBench(HazardLimits? limits = null, SourceKind kind = SourceKind.GraphiteTube, params string[] without)
    {
        foreach (string id in without)
        {
            _values.Remove(id);
        }

        Bench = new WatchBench(TestSite.Lab(TestSite.Source(TestSite.Rowan, [.. _values.Keys.Select(Channel)]) with { Kind = kind, Hazards = limits ?? HazardLimits.None }));
    }

    public WatchBench Bench { get; }

    public List<AlertCondition> Found => Bench.Conditions.Found;

    public IEnumerable<(string Code, bool Present)> Edges => Bench.Edges;

    public double this[string channel]
    {
        get => _values[channel];
        set => _values[channel] = value;
    }

    /// <summary>Sends all values as one pack.</summary>
    public void Send() => Bench.Watch.OnPack(new ReadingPack(TestSite.Rowan, Bench.Now, [.. _values.Select(pair => new Reading(pair.Key, Bench.Now, pair.Value))]));

    /// <summary>Lets seconds pass, with a pack each second.</summary>
    public void Pass(int seconds, Action<int>? change = null)
    {
        for (int i = 0; i < seconds; i++)
        {
            Bench.Clock.Advance(TimeSpan.FromSeconds(1));
            change?.Invoke(i);
            Send();
            Bench.Watch.Tick();
        }
    }

    private static Channel Channel(string id) =>
        new(new ChannelKey(TestSite.Rowan, id), "Channel " + id, Channels[id].Quantity, Channels[id].Unit, TimeSpan.FromSeconds(1))
        {
            IsReference = id == "well-1",
            SensorMaximum = id == "heater" ? 2 : null,
            Contact = id == "case" ? new SurfaceContact(Metrology.Hazards.SurfaceMaterial.UncoatedMetal, null, null) : null,
        };
}
