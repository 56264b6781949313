using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using Json.Schema;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Sources;

namespace LabWatch.Tests.Lab;

public sealed class LabFileReaderTests
{
    private static readonly JsonSchema Schema = JsonSchema.FromText(LabFileReader.Schema);

    /// <summary>Each breaks the good file in one place: code and pointer of the finding, whether the schema alone can see it, and the break.</summary>
    public static TheoryData<string, string, bool, Action<JsonObject>> Breaks { get; } = new()
    {
        { "missing", "/site", true, file => file.Remove("site") },
        { "unknown-format", "/format", true, file => file["format"] = "labwatch-lab/99" },
        { "unknown-time-zone", "/site/timeZone", false, file => file["site"]!["timeZone"] = "Atlantis/Capital" },
        { "unknown-member", "/sources/0/colour", true, file => file["sources"]![0]!["colour"] = "grey" },
        { "bad-id", "/sources/0/id", true, file => file["sources"]![0]!["id"] = "Fir One" },
        { "unknown-choice", "/sources/0/kind", true, file => file["sources"]![0]!["kind"] = "lamp" },
        { "empty-range", "/sources/0/range", false, file => file["sources"]![0]!["range"]!["minimumCelsius"] = 91 },
        { "out-of-range", "/sources/0/range/minimumCelsius", true, file => file["sources"]![0]!["range"]!["minimumCelsius"] = -300 },
        { "wrong-type", "/sources/0/range/minimumCelsius", true, file => file["sources"]![0]!["range"]!["minimumCelsius"] = "cold" },
        { "aperture-too-wide", "/sources/0/cavity/apertureRadiusMillimetre", false, file => file["sources"]![0]!["cavity"]!["apertureRadiusMillimetre"] = 31 },
        { "missing", "/sources/0/cavity/coating", true, file => file["sources"]![0]!["cavity"]!["coating"] = new JsonArray() },
        { "unit-not-permitted", "/sources/0/channels/1/unit", false, file => file["sources"]![0]!["channels"]![1]!["unit"] = "Ohm" },
        { "repeated-id", "/sources/0/channels", false, file => file["sources"]![0]!["channels"]![1]!["id"] = "well-1" },
        { "reference-channel", "/sources/0/channels", false, file => file["sources"]![0]!["channels"]![0]!["reference"] = false },
        { "missing", "/sources/0/channels/0/axialPositionMillimetre", false, file => file["sources"]![0]!["channels"]![0]!.AsObject().Remove("axialPositionMillimetre") },
        { "not-a-surface", "/sources/0/channels/1/contact", false, file => file["sources"]![0]!["channels"]![1]!["contact"] = new JsonObject { ["material"] = "wood" } },
        { "unknown-reference", "/instruments/0/installations/0", false, file => file["instruments"]![0]!["installations"]![0]!["channel"] = "well-9" },
        { "overlap", "/instruments/1/installations/0/from", false, file => file["instruments"]![1]!["installations"]![0]!["from"] = "2026-01-31T00:00:00Z" },
        { "bad-time", "/instruments/0/installations/0/from", true, file => file["instruments"]![0]!["installations"]![0]!["from"] = "2026-01-01" },
        { "unit-mismatch", "/instruments/0/certificates/0/characteristic", false, file => file["sources"]![0]!["channels"]![0]!["unit"] = "mV" },
        { "not-rising", "/instruments/1/certificates/0/characteristic/points/1/indicatedCelsius", false, file => file["instruments"]![1]!["certificates"]![0]!["characteristic"]!["points"]![1]!["indicatedCelsius"] = -20 },
        { "unknown-choice", "/limits/0/criterion", true, file => file["limits"]![0]!["criterion"] = "beauty" },
        { "unit-mismatch", "/limits/0/unit", false, file => file["limits"]![0]!["unit"] = "%" },
        { "unknown-reference", "/limits/0/source", false, file => file["limits"]![0]!["source"] = "oak" },
        { "not-whole", "/limits/0/revision", true, file => file["limits"]![0]!["revision"] = 1.5 },
        { "spot-too-wide", "/sources/0/view/spotRadiusMillimetre", false, file => file["sources"]![0]!["view"]!["spotRadiusMillimetre"] = 26 },
        { "missing", "/sources/0/view/distanceMillimetre", false, file => file["sources"]![0]!["view"]!.AsObject().Remove("distanceMillimetre") },
        { "unknown-choice", "/sources/0/view/kind", true, file => file["sources"]![0]!["view"]!["kind"] = "glance" },
        { "unknown-reference", "/sources/0/baselines/0/band", false, file => file["sources"]![0]!["baselines"]![0]!["band"] = "sw" },
        { "missing", "/sources/0/baselines/0/from", true, file => file["sources"]![0]!["baselines"]![0]!.AsObject().Remove("from") },
        { "out-of-range", "/sources/0/baselines/0/effectiveEmissivity", true, file => file["sources"]![0]!["baselines"]![0]!["effectiveEmissivity"] = 99.1 },
        { "out-of-range", "/sources/0/wellToWallDrop/partOfDifference/value", true, file => file["sources"]![0]!["wellToWallDrop"]!["partOfDifference"]!["value"] = 1 },
        { "empty-range", "/sources/0/cavity/uniformZone", false, file => file["sources"]![0]!["cavity"]!["uniformZone"]!["toMillimetre"] = 10 },
        { "missing", "/sources/0/cavity/coating/0/secondEmissivity", false, file => file["sources"]![0]!["cavity"]!["secondMaterial"] = "aperture-plate" },
        { "unknown-choice", "/sources/0/cavity/secondMaterial", true, file => file["sources"]![0]!["cavity"]!["secondMaterial"] = "none" },
        { "no-second-material", "/sources/0/cavity/coating/0/secondEmissivity", false, file => file["sources"]![0]!["cavity"]!["coating"]![0]!["secondEmissivity"] = new JsonObject { ["value"] = 0.9, ["standardUncertainty"] = 0.01 } },
        { "unknown-reference", "/instruments/0/certificates/0/calibratedAgainst", false, file => file["instruments"]![0]!["certificates"]![0]!["calibratedAgainst"] = "oak" },
        { "bad-address", "/notifiers/0/address", true, file => file["notifiers"]![0]!["address"] = "ftp://messages.example" },
        { "missing", "/notifiers/0/address", true, file => file["notifiers"]![0]!.AsObject().Remove("address") },
    };

    [Fact]
    public void A_good_file_with_comments_gives_a_snapshot()
    {
        LabFileResult result = LabFileReader.Read(Encoding.UTF8.GetBytes(LabFileSample.Text));

        Assert.Empty(result.Findings);
        ReferenceSource fir = Assert.Single(result.Snapshot!.Sources);
        Assert.Equal("sample.fir", fir.Key.ToString());
        Assert.Equal(SourceKind.StirredBath, fir.Kind);
        Assert.Equal("well-1", fir.ReferenceChannel!.Id);
        Assert.IsType<CallendarVanDusenCharacteristic>(result.Snapshot.Certificates[0].Characteristic);
        Assert.Equal(new ApertureView(ApertureViewKind.Cone, 10, 700), fir.View);
        Assert.Equal(new AxialRange(20, 300), fir.Cavity.UniformZone);
        Assert.Equal(0.9993, Assert.Single(fir.Baselines).EffectiveEmissivity.Value);
        Assert.Equal((0.5, 1.0), (fir.SurroundingsOffsetKelvin.Value, fir.SurroundingsOffsetKelvin.StandardUncertainty));
        Assert.Equal(2e-4, fir.WellToWallDrop.StandardUncertainty);
        Assert.Equal(fir.Key, result.Snapshot.Certificates[1].CalibratedAgainst);
    }

    [Fact]
    public void What_is_not_stated_about_the_radiance_is_the_usual()
    {
        JsonObject file = Good();
        foreach (string member in new[] { "view", "baselines", "surroundings", "wellToWallDrop" })
        {
            file["sources"]![0]!.AsObject().Remove(member);
        }

        ReferenceSource fir = LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString())).Snapshot!.Sources[0];

        Assert.Null(fir.View);
        Assert.Empty(fir.Baselines);
        Assert.Equal((ReferenceSource.UsualSurroundingsOffsetKelvin, ReferenceSource.UsualWellToWallDrop), (fir.SurroundingsOffsetKelvin, fir.WellToWallDrop));
    }

    [Fact]
    public void A_second_material_takes_an_emissivity_in_each_band()
    {
        JsonObject file = Good();
        file["sources"]![0]!["cavity"]!["secondMaterial"] = "bottom-and-aperture-plate";
        file["sources"]![0]!["cavity"]!["coating"]![0]!["secondEmissivity"] = new JsonObject { ["value"] = 0.9, ["standardUncertainty"] = 0.01 };

        Cavity cavity = LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString())).Snapshot!.Sources[0].Cavity;

        Assert.Equal(SecondSurface.BottomAndAperturePlate, cavity.SecondMaterial);
        Assert.Equal(0.9, cavity.Coating[0].SecondEmissivity!.Value.Value);
        Assert.True(Schema.Evaluate(Element(file)).IsValid);
    }

    [Fact]
    public void The_example_that_is_delivered_is_good() =>
        Assert.Empty(LabFileReader.Read(File.ReadAllBytes(RepositoryFiles.PathOf("deploy", "lab.example.json"))).Findings);

    [Fact]
    public void The_published_schema_accepts_the_good_file() => Assert.True(Schema.Evaluate(Element(Good())).IsValid);

    [Theory]
    [MemberData(nameof(Breaks))]
    public void A_broken_file_is_located_by_the_reader_and_refused_by_the_schema_where_it_can(
        string code, string where, bool schemaSees, Action<JsonObject> breakIt)
    {
        JsonObject file = Good();
        breakIt(file);

        LabFileResult result = LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString()));

        Assert.Null(result.Snapshot);
        Assert.Contains(result.Findings, finding => finding.Code == code && finding.Where == where);
        Assert.All(result.Findings, finding => Assert.False(string.IsNullOrWhiteSpace(finding.Cure)));
        Assert.Equal(schemaSees, !Schema.Evaluate(Element(file)).IsValid);
    }

    [Fact]
    public void All_findings_come_at_once()
    {
        JsonObject file = Good();
        file["site"]!["id"] = "NO";
        file["sources"]![0]!["kind"] = "lamp";
        file["limits"]![0]!["maximum"] = -1;

        IReadOnlyList<Finding> findings = LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString())).Findings;

        Assert.Equal(["/site/id", "/sources/0/kind", "/limits/0/maximum"], findings.Select(finding => finding.Where).Intersect(["/site/id", "/sources/0/kind", "/limits/0/maximum"]));
    }

    [Theory]
    [InlineData("")]
    [InlineData("{")]
    [InlineData("[]")]
    [InlineData("{\"format\":\"labwatch-lab/1\",\"format\":\"labwatch-lab/1\"}")]
    [InlineData("\u0000")]
    [InlineData("{\"format\":\"\\ud800\"}")]
    [InlineData("{\"\\udc00\":1}")]
    [InlineData("{\"sources\":[null,1,[]]}")]
    public void Text_that_is_no_lab_file_gives_findings(string text) =>
        Assert.NotEmpty(LabFileReader.Read(Encoding.UTF8.GetBytes(text)).Findings);

    [Fact]
    public void Random_damage_to_a_good_file_never_throws()
    {
        byte[] good = Encoding.UTF8.GetBytes(LabFileSample.Text);
        Random random = new(20261);
        for (int round = 0; round < 2000; round++)
        {
            byte[] damaged = [.. good];
            for (int i = 0; i <= round % 5; i++)
            {
                damaged[random.Next(damaged.Length)] = (byte)random.Next(256);
            }

            LabFileResult result = LabFileReader.Read(damaged);
            Assert.True(result.Snapshot is null != (result.Findings.Count == 0));
        }
    }

    private static JsonObject Good() => JsonNode.Parse(LabFileSample.Text, null, new JsonDocumentOptions { CommentHandling = JsonCommentHandling.Skip, AllowTrailingCommas = true })!.AsObject();

    private static JsonElement Element(JsonObject file) => JsonSerializer.SerializeToElement(file);
}
