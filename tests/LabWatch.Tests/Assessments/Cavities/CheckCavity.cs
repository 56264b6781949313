using System.Globalization;
using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Readings;

namespace LabWatch.Tests.Assessments.Cavities;

/// <summary>A row of the check values of cavities as a source of a lab file, in millimetres, judged by the criterion itself.</summary>
internal sealed record CheckCavity(IReadOnlyDictionary<string, string> Row)
{
    /// <summary>The rows give lengths in radii.</summary>
    private const double RadiusMillimetre = 20;

    private static readonly SourceKey Key = new("check", "cavity");

    public string Id => Row["row_id"];

    public bool IsSeenFromOutside => Row["view"] is "beam" or "cone" or "hemi" or "hemispherical";

    public double Value(string column) => double.Parse(Row[column], CultureInfo.InvariantCulture);

    /// <summary>All rows of a file of check values.</summary>
    public static IEnumerable<CheckCavity> Read(string file)
    {
        string[] lines = [.. File.ReadLines(RepositoryFiles.PathOf("tests", "LabWatch.Metrology.Tests", "Checks", "Data", file)).Where(line => !line.StartsWith('#'))];
        string[] names = lines[0].Split(',');
        foreach (string line in lines.Skip(1))
        {
            string[] fields = line.Split(',');
            if (fields.Length >= names.Length)
            {
                yield return new(names.Select((name, i) => (name, fields[i])).ToDictionary(pair => pair.name, pair => pair.Item2, StringComparer.Ordinal));
            }
        }
    }

    /// <summary>What the criterion finds for wells at some heights (in radii above the rim of the bottom), the first of them the reference.</summary>
    public CriterionResult Evaluate(string band, double lower, double upper, params ReadOnlySpan<(double Height, double Kelvin)> wells)
    {
        double length = Value("Lc");
        Channel[] channels = new Channel[wells.Length];
        List<ReadingSeries> series = [];
        TimeWindow window = EffectiveEmissivityCriterion.DefaultSchedule.EndingAt(TestLab.Noon);
        for (int i = 0; i < wells.Length; i++)
        {
            string id = "well-" + i.ToString(CultureInfo.InvariantCulture);
            channels[i] = new(new(Key, id), id, ChannelQuantity.WellThermometer, "Cel", TimeSpan.FromMinutes(1))
            {
                AxialPositionMillimetre = (length - wells[i].Height) * RadiusMillimetre,
                IsReference = i == 0,
            };
            double celsius = wells[i].Kelvin - 273.15;
            long[] times = [.. Enumerable.Range(0, 30).Select(minute => (window.Start + TimeSpan.FromMinutes(minute)).Microseconds)];
            series.Add(new(id, times, times.Select(_ => celsius).ToArray(), new ReadingQuality[times.Length]));
        }

        ReferenceSource source = new(
            Key, "check", SourceKind.BlockFurnace, TraceabilityRoute.Contact, 0, 3000, Cavity(band), [new(band, band, lower, upper)], channels)
        { View = View(), WellToWallDrop = new(0, 0) };
        LabSnapshot snapshot = new(
            new LabSite("check", "check", "UTC"),
            [source],
            [.. channels.Select(channel => new Instrument("i-" + channel.Id, "0", "check"))],
            [.. channels.Select(channel => new Installation("i-" + channel.Id, channel.Key, TestLab.LongAgo, null))],
            [.. channels.Select(channel => new Certificate(
                "c-" + channel.Id, 1, "i-" + channel.Id, "0", "check", TestLab.LongAgo, null, -273, 4000,
                new CorrectionTableCharacteristic(0.002, 2, [new CorrectionPoint(-273, 0), new CorrectionPoint(4000, 0)])))],
            [],
            []);
        EffectiveEmissivityCriterion criterion = new(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models);
        return criterion.Evaluate(new CriterionInput(snapshot, source, window, new ReadingWindow(Key, window, series, [])))[0];
    }

    private Cavity Cavity(string band) => new(
        Row["shape"] switch
        {
            "cylinder-flat" => CavityShape.Cylinder,
            "cylinder-cone-out" => CavityShape.CylinderOutwardCone,
            "cylinder-cone-re" => CavityShape.CylinderInwardCone,
            string shape => throw new FormatException(shape),
        },
        RadiusMillimetre * Value("R"),
        RadiusMillimetre * Value("Lc"),
        Row["cone_half_deg"].Length > 0 ? Value("cone_half_deg") : null,
        RadiusMillimetre * Value("r"),
        [new(band, new(Value("eps"), 0), new(Value("D"), 0))]);

    private ApertureView View() => Row["view"] switch
    {
        "beam" => new(ApertureViewKind.Beam, RadiusMillimetre * Value("rb"), 0),
        "cone" => new(ApertureViewKind.Cone, RadiusMillimetre * Value("rs"), RadiusMillimetre * Value("d")),
        _ => new(ApertureViewKind.Hemispherical, 0, 0),
    };
}
