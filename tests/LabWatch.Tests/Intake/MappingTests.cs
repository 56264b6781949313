using System.Text;
using System.Text.Json;
using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;

namespace LabWatch.Tests.Intake;

/// <summary>JSON of gateways that is no SenML.</summary>
public class MappingTests
{
    private static readonly MappingOptions Gateway = new()
    {
        Topic = "gateways/+/{source}",
        Time = "/at",
        Values = [new() { At = "/sensors/0/ohm", Channel = "well-1" }, new() { At = "/shell", Channel = "shell", Unit = "K" }, new() { At = "/open", Channel = "shutter" }],
    };

    // RFC 6901 section 5: the document and all its pointers.
    [Theory]
    [InlineData("", null)]
    [InlineData("/foo", """["bar", "baz"]""")]
    [InlineData("/foo/0", "\"bar\"")]
    [InlineData("/", "0")]
    [InlineData("/a~1b", "1")]
    [InlineData("/c%d", "2")]
    [InlineData("/e^f", "3")]
    [InlineData("/g|h", "4")]
    [InlineData("/i\\j", "5")]
    [InlineData("/k\"l", "6")]
    [InlineData("/ ", "7")]
    [InlineData("/m~0n", "8")]
    public void Pointers_of_rfc_6901_lead_where_it_says(string written, string? expected)
    {
        const string Document = """{"foo": ["bar", "baz"], "": 0, "a/b": 1, "c%d": 2, "e^f": 3, "g|h": 4, "i\\j": 5, "k\"l": 6, " ": 7, "m~n": 8}""";
        using JsonDocument document = JsonDocument.Parse(Document);
        Assert.True(JsonPointer.TryParse(written, out JsonPointer parsed));
        Assert.True(parsed.TryEvaluate(document.RootElement, out JsonElement value));
        Assert.Equal(expected ?? Document, value.GetRawText());
    }

    [Theory]
    [InlineData("foo")]
    [InlineData("/a~2")]
    [InlineData("/a~")]
    public void What_is_no_pointer_is_found(string text) => Assert.False(JsonPointer.TryParse(text, out _));

    [Theory]
    [InlineData("/foo/01")]
    [InlineData("/foo/-")]
    [InlineData("/foo/2")]
    [InlineData("/foo/0/x")]
    [InlineData("/bar")]
    public void A_pointer_to_nothing_leads_nowhere(string text)
    {
        using JsonDocument document = JsonDocument.Parse("""{"foo":["bar","baz"]}""");
        Assert.True(JsonPointer.TryParse(text, out JsonPointer pointer));
        Assert.False(pointer.TryEvaluate(document.RootElement, out _));
    }

    [Theory]
    [InlineData("gateways/+/{source}", "gateways/a/fir", true, "fir")]
    [InlineData("gateways/+/{source}", "gateways/a/fir/x", false, null)]
    [InlineData("gateways/+/{source}", "gateways/a", false, null)]
    [InlineData("a/b", "a/b", true, null)]
    [InlineData("a/b", "a/c", false, null)]
    public void Patterns_match_whole_topics(string pattern, string topic, bool fits, string? source)
    {
        Assert.Equal(fits, new TopicPattern(pattern).Matches(topic, out string? found));
        if (fits)
        {
            Assert.Equal(source, found);
        }
    }

    [Fact]
    public void A_mapped_message_becomes_readings()
    {
        DecodedMessage decoded = Decode(Gateway, """{"at":"2026-12-01T08:15:29.5Z","sensors":[{"ohm":"107.7935"}],"shell":300.15,"open":true}""");
        Assert.Empty(decoded.Findings);
        Assert.Equal(IntakeLab.Fir, decoded.Pack!.Source);
        Assert.Equal([("well-1", 107.7935), ("shell", 27), ("shutter", 1)], decoded.Pack.Readings.Select(reading => (reading.Channel, reading.Value)));
        Assert.All(decoded.Pack.Readings, reading => Assert.Equal("2026-12-01T08:15:29.5Z", reading.Time.ToString()));
        Assert.Equal(ReadingQuality.Converted, decoded.Pack.Readings[1].Quality);
    }

    [Theory]
    [InlineData(MappedTime.UnixSeconds, "1796112929.5")]
    [InlineData(MappedTime.UnixMilliseconds, "1796112929500")]
    [InlineData(MappedTime.UnixMicroseconds, "\"1796112929500000\"")]
    [InlineData(MappedTime.UnixNanoseconds, "1796112929500000999")]
    [InlineData(MappedTime.Rfc3339, "\"2026-12-01T09:15:29.500+01:00\"")]
    public void Times_are_read_as_the_mapping_says(MappedTime format, string time)
    {
        DecodedMessage decoded = Decode(Gateway with { TimeFormat = format, Values = [new() { At = "/v", Channel = "well-1" }] }, $$"""{"at":{{time}},"v":1}""");
        Assert.Equal("2026-12-01T08:15:29.5Z", Assert.Single(decoded.Pack!.Readings).Time.ToString());
    }

    [Fact]
    public void Items_each_have_their_time()
    {
        MappingOptions mapping = Gateway with { Items = "/batch", TimeFormat = MappedTime.UnixSeconds, Values = [new() { At = "/v", Channel = "well-1" }] };
        DecodedMessage decoded = Decode(mapping, """{"batch":[{"at":1796112928,"v":1},{"at":"x","v":2},{"at":1796112929,"v":3}]}""");
        Assert.Equal([1, 3], decoded.Pack!.Readings.Select(reading => reading.Value));
        Assert.Equal("/batch/1/at", Assert.Single(decoded.Findings).Where);
    }

    [Theory]
    [InlineData("""{"at":"2026-12-01T08:15:29Z","sensors":[],"shell":300.15,"open":true}""", IntakeCode.MappedMissing, "/sensors/0/ohm", 2)]
    [InlineData("""{"at":"2026-12-01T08:15:29Z","sensors":[{"ohm":{}}],"shell":300.15,"open":true}""", IntakeCode.ValueNotNumber, "/sensors/0/ohm", 2)]
    [InlineData("""{"at":"2026-12-01T08:15:29Z","sensors":[{"ohm":"1e999"}],"shell":300.15,"open":true}""", IntakeCode.ValueOutOfRange, "/sensors/0/ohm", 2)]
    [InlineData("""{"at":"2026-12-01T08:15:29Z","sensors":[{"ohm":-1e999}],"shell":300.15,"open":true}""", IntakeCode.ValueOutOfRange, "/sensors/0/ohm", 2)]
    [InlineData("""{"at":"2027-12-01T08:15:29Z","sensors":[{"ohm":1}],"shell":300.15,"open":true}""", IntakeCode.TimeInTheFuture, "/at", 0)]
    [InlineData("""{"sensors":[{"ohm":1}],"shell":300.15,"open":true}""", IntakeCode.MappedMissing, "/at", 0)]
    [InlineData("""{"sensors":[{"ohm":1}],"shell":""", IntakeCode.MalformedJson, "payload", 0)]
    public void What_cannot_be_a_reading_is_refused_with_its_place(string payload, string code, string where, int kept)
    {
        DecodedMessage decoded = Decode(Gateway, payload);
        Finding finding = Assert.Single(decoded.Findings);
        Assert.Equal((code, where), (finding.Code, finding.Where));
        Assert.Equal(kept, decoded.Pack?.Readings.Count ?? 0);
    }

    [Fact]
    public void A_mapping_that_does_not_fit_is_found_at_the_start()
    {
        MappingOptions wrong = new() { Topic = "a/#", Source = "fir", Time = "x", Values = [new() { At = "y", Channel = "Well", Unit = "furlong" }] };
        Assert.Equal(
            ["m.Topic", "m.Source", "m.Time", "m.Values.0.At", "m.Values.0.Channel", "m.Values.0.Unit"],
            wrong.Validate("m").Select(finding => finding.Where));
        MappingOptions misplaced = Gateway with { Topic = "g", Source = "hollin-vale.fir", Values = [new() { At = "/v", Channel = "well-9" }, new() { At = "/w", Channel = "shell", Unit = "W" }] };
        Assert.Empty(misplaced.Validate("m"));
        Assert.Equal([IntakeCode.UnknownChannel, IntakeCode.UnitMismatch], MappingTable.Check([misplaced], new IntakeLab().Current).Select(finding => finding.Code));
    }

    private static DecodedMessage Decode(MappingOptions mapping, string payload) =>
        DecodingBench.Decode(Encoding.UTF8.GetBytes(payload), "gateways/a/fir", false, DecodingBench.Decoder(mappings: mapping));
}
