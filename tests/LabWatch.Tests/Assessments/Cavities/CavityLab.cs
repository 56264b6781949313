using LabWatch.Assessments;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;

namespace LabWatch.Tests.Assessments.Cavities;

/// <summary>One invented cavity with three calibrated wells, an indicator, a lip, a shutter and a comparator, and steady readings of them.</summary>
internal sealed record CavityLab
{
    public static readonly SourceKey Key = new("hollin-vale", "rowan");

    public static readonly Instant Noon = TestLab.Noon;

    public Cavity Cavity { get; init; } = new(CavityShape.CylinderOutwardCone, 25, 200, 60, 20, [new("8-14", new(0.94, 0.006), new(1, 0))]);

    public IReadOnlyList<EmissivityBaseline> Baselines { get; init; } = [];

    public double WellUncertainty { get; init; } = 0.01;

    public double ComparatorUncertainty { get; init; } = 0.1;

    public SourceKey? CalibratedAgainst { get; init; }

    /// <summary>Channels without a certificate.</summary>
    public IReadOnlyList<string> Uncertified { get; init; } = ["lip", "ambient"];

    public double UniformityLimit { get; init; } = 1500;

    public double EmissivityLimit { get; init; } = 0.005;

    public DecisionRule Rule { get; init; } = DecisionRule.SimpleAcceptance;

    public double SetPoint { get; init; } = 300;

    public double Bottom { get; init; } = 300;

    public double Middle { get; init; } = 299.8;

    public double Front { get; init; } = 299;

    public double Indicator { get; init; } = 299.5;

    public double Lip { get; init; } = 120;

    public double Ambient { get; init; } = 23;

    public double Comparator { get; init; } = 299.7;

    public double Shutter { get; init; } = 1;

    public LabSnapshot Snapshot()
    {
        Channel[] channels =
        [
            Channel("well-bottom", ChannelQuantity.WellThermometer) with { AxialPositionMillimetre = 190, IsReference = true },
            Channel("well-middle", ChannelQuantity.WellThermometer) with { AxialPositionMillimetre = 110 },
            Channel("well-front", ChannelQuantity.WellThermometer) with { AxialPositionMillimetre = 30 },
            Channel("indicator", ChannelQuantity.WellThermometer) with { AxialPositionMillimetre = 150 },
            Channel("set-point", ChannelQuantity.SetPoint),
            Channel("lip", ChannelQuantity.ApertureLip),
            Channel("ambient", ChannelQuantity.AmbientTemperature),
            Channel("shutter", ChannelQuantity.Shutter) with { Unit = "/" },
            Channel("comparator", ChannelQuantity.ComparatorTemperature) with { Band = "8-14", SensorMinimum = -20, SensorMaximum = 1000 },
        ];
        ReferenceSource source = new(
            Key, "Rowan", SourceKind.BlockFurnace, TraceabilityRoute.Contact, -20, 500, Cavity, [new("8-14", "8 to 14 um", 8, 14)], channels)
        { Baselines = Baselines };
        Channel[] certified = [.. channels.Where(channel => channel.Quantity is not (ChannelQuantity.SetPoint or ChannelQuantity.Shutter) && !Uncertified.Contains(channel.Id))];
        return new(
            new LabSite("hollin-vale", "Hollin Vale", "Europe/Dublin"),
            [source],
            [.. certified.Select(channel => new Instrument("i-" + channel.Id, "0", "invented"))],
            [.. certified.Select(channel => new Installation("i-" + channel.Id, channel.Key, TestLab.LongAgo, null))],
            [.. certified.Select(Certificate)],
            [
                new AcceptanceLimit("axial", 1, Key, CriterionCode.AxialUniformity, UniformityLimit, "mK", Rule, TestLab.LongAgo),
                new AcceptanceLimit("emissivity", 1, Key, CriterionCode.EffectiveEmissivity, EmissivityLimit, "/", Rule, TestLab.LongAgo) { Band = "8-14" },
            ],
            []);
    }

    /// <summary>Steady readings each 10 s over a span, without noise, changed by a function of channel, time and value.</summary>
    public ReadingWindow Readings(TimeWindow span, Func<string, Instant, double, (double Value, ReadingQuality Quality)?>? change = null)
    {
        List<ReadingSeries> series = [];
        foreach ((string id, double steady) in new (string, double)[]
        {
            ("well-bottom", Bottom), ("well-middle", Middle), ("well-front", Front), ("indicator", Indicator), ("set-point", SetPoint), ("lip", Lip), ("ambient", Ambient),
            ("shutter", Shutter), ("comparator", Comparator),
        })
        {
            List<(long Time, double Value, ReadingQuality Quality)> kept = [];
            for (Instant time = span.Start; time < span.End; time += TimeSpan.FromSeconds(10))
            {
                if ((change is null ? (steady, ReadingQuality.None) : change(id, time, steady)) is { } reading)
                {
                    kept.Add((time.Microseconds, reading.Value, reading.Quality));
                }
            }

            if (kept.Count > 0)
            {
                series.Add(new(id, kept.Select(row => row.Time).ToArray(), kept.Select(row => row.Value).ToArray(), kept.Select(row => row.Quality).ToArray()));
            }
        }

        return new(Key, span, series, []);
    }

    public IReadOnlyList<CriterionResult> Evaluate(ICriterion criterion, Func<string, Instant, double, (double Value, ReadingQuality Quality)?>? change = null)
    {
        LabSnapshot snapshot = Snapshot();
        TimeWindow window = criterion.Schedule.EndingAt(Noon);
        return criterion.Evaluate(new CriterionInput(snapshot, snapshot.Sources[0], window, Readings(criterion.Schedule.SpanOf(window), change)));
    }

    private static Channel Channel(string id, ChannelQuantity quantity) => new(new(Key, id), id, quantity, "Cel", TimeSpan.FromSeconds(10));

    private Certificate Certificate(Channel channel)
    {
        double u = channel.Id switch { "comparator" => ComparatorUncertainty, "indicator" => 0.1, _ => WellUncertainty };
        return new(
            "cal-" + channel.Id, 1, "i-" + channel.Id, "HV-" + channel.Id, "invented", TestLab.LongAgo, null, -50, 600,
            new CorrectionTableCharacteristic(2 * u, 2, [new CorrectionPoint(-50, 0), new CorrectionPoint(600, 0)]))
        {
            CalibratedAgainst = channel.Id == "comparator" ? CalibratedAgainst : null,
        };
    }
}
