using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Lab;

public sealed class LabDocumentTests
{
    private static readonly byte[] Sample = Encoding.UTF8.GetBytes(LabFileSample.Text);

    [Fact]
    public void A_file_taken_apart_and_put_together_again_reads_the_same()
    {
        JsonObject again = LabDocument.Join(LabDocument.Split(LabDocument.Parse(Sample)));
        LabFileResult result = LabFileReader.Read(LabDocument.Write(again));
        Assert.Empty(result.Findings);
        Assert.Equivalent(LabFileReader.Read(Sample).Snapshot, result.Snapshot);
        Assert.Equal(
            LabDocument.Split(LabDocument.Parse(Sample)).Select(entry => (entry.Kind, entry.Id, entry.Revision)),
            LabDocument.Split(again).Select(entry => (entry.Kind, entry.Id, entry.Revision)));
    }

    [Fact]
    public void Every_entry_is_a_record_of_its_own() =>
        Assert.Equal(
            [
                "site sample", "source fir", "instrument prt-1", "installation prt-1/fir/well-1/2026-01-01T00:00:00Z", "certificate c-1@1",
                "instrument ind-1", "installation ind-1/fir/lip/2026-02-01T00:00:00Z", "certificate c-2@1",
                "instrument ind-0", "installation ind-0/fir/lip/2026-01-01T00:00:00Z", "limit fir-stability@1", "notifier gateway",
            ],
            LabDocument.Split(LabDocument.Parse(Sample))
                .Select(entry => $"{LabEntry.NameOf(entry.Kind)} {entry.Id}{(entry.Revision is { } revision ? FormattableString.Invariant($"@{revision}") : string.Empty)}"));

    [Fact]
    public void What_is_recorded_dates_sources_keeps_former_ones_and_ends_what_was_withdrawn()
    {
        JsonObject document = LabDocument.Parse(Sample);
        JsonNode former = document["sources"]![0]!.DeepClone();
        former["channels"]!.AsArray().Add(JsonNode.Parse("""{ "id": "old-case", "name": "Removed", "quantity": "outer-surface", "unit": "Cel", "intervalSeconds": 1 }"""));
        document["instruments"]![1]!["installations"]!.AsArray().Add(
            JsonNode.Parse("""{ "source": "fir", "channel": "old-case", "from": "2025-01-01T00:00:00Z", "until": "2025-06-01T00:00:00Z" }"""));
        document["recorded"] = new JsonObject
        {
            ["sequence"] = 14,
            ["importDigest"] = new string('a', 64),
            ["sources"] = JsonNode.Parse("""[{ "id": "fir", "revision": 2, "effectiveFrom": "2026-03-01T00:00:00Z" }]"""),
            ["formerSources"] = new JsonArray(new JsonObject { ["revision"] = 1, ["effectiveFrom"] = "2026-01-01T00:00:00Z", ["description"] = former }),
            ["withdrawn"] = JsonNode.Parse("""[{ "kind": "limit", "id": "fir-stability", "from": "2026-05-01T00:00:00Z" }, { "kind": "certificate", "id": "c-1", "from": "2026-05-01T00:00:00Z" }]"""),
        };
        LabFileResult result = LabFileReader.Read(LabDocument.Write(document));
        Assert.Empty(result.Findings);
        Assert.Equal(new LabRecorded(14, new string('a', 64)), result.Recorded);
        LabSnapshot lab = result.Snapshot!;
        SourceKey fir = lab.Sources[0].Key;
        Assert.Equal(["fir@1", "fir@2"], [lab.SourceInForce(fir, At("2026-02-01T00:00:00Z"))!.Reference, lab.SourceInForce(fir, At("2026-03-01T00:00:00Z"))!.Reference]);
        ChannelKey well = new(fir, "well-1");
        Assert.NotNull(lab.CertificateInForce(well, At("2026-04-30T23:59:59Z")));
        Assert.Null(lab.CertificateInForce(well, At("2026-05-01T00:00:00Z")));
        Assert.NotNull(lab.LimitInForce(fir, "stability", 30, null, At("2026-04-30T23:59:59Z")));
        Assert.Null(lab.LimitInForce(fir, "stability", 30, null, At("2026-05-01T00:00:00Z")));
    }

    [Theory]
    [InlineData("""{ "sequence": "x" }""")]
    [InlineData("""{ "sequence": 1e300, "formerSources": [ {} , 3 ] }""")]
    [InlineData("""{ "withdrawn": [ { "kind": 1 } ], "sources": [ { "id": "fir" } ] }""")]
    [InlineData("[]")]
    public void A_spoilt_member_gives_findings_and_no_exception(string recorded)
    {
        JsonObject document = LabDocument.Parse(Sample);
        document["recorded"] = JsonNode.Parse(recorded);
        Assert.All(LabFileReader.Read(LabDocument.Write(document)).Findings, finding => Assert.StartsWith("/recorded", finding.Where, StringComparison.Ordinal));
        Assert.NotEmpty(LabFileReader.Read(LabDocument.Write(document)).Findings);
    }

    private static Instant At(string text) => Instant.TryParse(text, out Instant instant) ? instant : throw new ArgumentException(text, nameof(text));
}
