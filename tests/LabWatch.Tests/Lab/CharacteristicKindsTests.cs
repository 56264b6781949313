using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using Json.Schema;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.LabFile;

namespace LabWatch.Tests.Lab;

public sealed class CharacteristicKindsTests
{
    private static readonly JsonSchema Schema = JsonSchema.FromText(LabFileReader.Schema);

    public static TheoryData<string, string, Type> Good { get; } = new()
    {
        {
            """{ "kind": "sprt", "triplePointOhm": 25.479112, "above": { "subrange": "water-to-zinc", "a": -1.9736e-4, "b": -2.114e-5 } }""",
            "Ohm", typeof(SprtCharacteristic)
        },
        {
            """{ "kind": "sprt", "triplePointOhm": 25.5, "below": { "subrange": "argon-to-water", "a": -2e-4, "b": -8e-6 }, "above": { "subrange": "water-to-silver", "a": -2e-4, "b": -4e-5, "c": 5e-6, "d": -1e-5, "ratioAtAluminium": 3.3754 } }""",
            "Ohm", typeof(SprtCharacteristic)
        },
        { """{ "kind": "thermocouple", "type": "S", "deviationMillivolt": [1e-5, -2e-9], "referenceJunctionCelsius": 0 }""", "mV", typeof(ThermocoupleCharacteristic) },
        { """{ "kind": "thermocouple", "type": "K" }""", "mV", typeof(ThermocoupleCharacteristic) },
        { """{ "kind": "polynomial", "rawUnit": "Ohm", "rawMinimum": 80, "rawMaximum": 200, "coefficients": [-245, 2.3, 1e-3] }""", "Ohm", typeof(PolynomialCharacteristic) },
        { """{ "kind": "sakuma-hattori", "rawUnit": "mV", "aMicrometre": 0.9, "bMicrometreKelvin": 2, "c": 1e-6 }""", "mV", typeof(SakumaHattoriCharacteristic) },
    };

    public static TheoryData<string, string, string> Bad { get; } = new()
    {
        { """{ "kind": "sprt", "triplePointOhm": 25.5 }""", "missing", "/above" },
        { """{ "kind": "sprt", "triplePointOhm": 25.5, "above": { "subrange": "water-to-zinc", "a": -2e-4 } }""", "missing", "/above/b" },
        { """{ "kind": "sprt", "triplePointOhm": 25.5, "above": { "subrange": "water-to-gallium", "a": -2e-4, "b": 1e-5 } }""", "unknown-member", "/above/b" },
        { """{ "kind": "thermocouple", "type": "C" }""", "unknown-choice", "/type" },
        { """{ "kind": "thermocouple", "type": "7" }""", "unknown-choice", "/type" },
        { """{ "kind": "thermocouple", "type": "K", "deviationMillivolt": [0.1, "x"] }""", "out-of-range", "/deviationMillivolt/1" },
        { """{ "kind": "polynomial", "rawUnit": "Ohm", "rawMinimum": 80, "rawMaximum": 80, "coefficients": [1] }""", "empty-range", "/rawMaximum" },
        { """{ "kind": "polynomial", "rawUnit": "Ohm", "rawMinimum": 80, "rawMaximum": 90, "coefficients": [] }""", "empty", "/coefficients" },
        { """{ "kind": "sakuma-hattori", "rawUnit": "mV", "aMicrometre": 0, "bMicrometreKelvin": 2, "c": 1e-6 }""", "out-of-range", "/aMicrometre" },
        { """{ "kind": "crystal-ball" }""", "unknown-choice", "/kind" },
    };

    [Theory]
    [MemberData(nameof(Good))]
    public void Good_characteristic_is_read_and_meets_the_schema(string characteristic, string unit, Type expected)
    {
        JsonObject file = With(characteristic, unit);

        LabFileResult result = LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString()));

        using JsonDocument document = JsonDocument.Parse(file.ToJsonString());
        Assert.True(Schema.Evaluate(document.RootElement).IsValid);
        Assert.Empty(result.Findings);
        Assert.IsType(expected, result.Snapshot!.Certificates[0].Characteristic);
    }

    [Theory]
    [MemberData(nameof(Bad))]
    public void Bad_characteristic_is_a_finding_at_its_place(string characteristic, string code, string member)
    {
        LabFileResult result = LabFileReader.Read(Encoding.UTF8.GetBytes(With(characteristic, "Ohm").ToJsonString()));

        Assert.Contains(
            result.Findings, finding => finding.Code == code && finding.Where == "/instruments/0/certificates/0/characteristic" + member);
    }

    [Fact]
    public void Triple_point_checks_are_read_and_meet_the_schema()
    {
        JsonObject file = With("""{ "kind": "sprt", "triplePointOhm": 25.5, "above": { "subrange": "water-to-gallium", "a": -2e-4 } }""", "Ohm");
        file["instruments"]![0]!["triplePointChecks"] = JsonNode.Parse(
            """[ { "id": "tpw-1", "revision": 1, "at": "2026-06-01T08:00:00Z", "triplePointOhm": { "value": 25.50012, "standardUncertainty": 1e-5 } } ]""");

        LabFileResult result = LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString()));

        using JsonDocument document = JsonDocument.Parse(file.ToJsonString());
        Assert.True(Schema.Evaluate(document.RootElement).IsValid);
        Assert.Empty(result.Findings);
        Assert.Equal(25.50012, Assert.Single(result.Snapshot!.TriplePointChecks).TriplePointOhm.Value);
    }

    private static JsonObject With(string characteristic, string unit)
    {
        JsonDocumentOptions lenient = new() { CommentHandling = JsonCommentHandling.Skip, AllowTrailingCommas = true };
        JsonObject file = JsonNode.Parse(LabFileSample.Text, documentOptions: lenient)!.AsObject();
        JsonObject added = JsonNode.Parse(characteristic)!.AsObject();
        added["expandedUncertaintyKelvin"] = 0.01;
        added["coverageFactor"] = 2;
        file["instruments"]![0]!["certificates"]![0]!["characteristic"] = added;
        file["sources"]![0]!["channels"]![0]!["unit"] = unit;
        return file;
    }
}
