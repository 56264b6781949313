using System.Globalization;
using System.Text;
using LabWatch.Intake.Payloads;
using LabWatch.Lab.Readings;

namespace LabWatch.Tests.Intake;

public class PayloadDecoderTests
{
    private const string Now = "1796112930";

    [Theory]
    [InlineData("lab/hollin-vale/fir/unknown", IntakeCode.UnknownChannel)]
    [InlineData("lab/hollin-vale/oak", IntakeCode.UnknownSource)]
    [InlineData("lab/hollin-vale/oak/well-1", IntakeCode.UnknownSource)]
    [InlineData("lab/other/fir", IntakeCode.UnknownSource)]
    [InlineData("lab/hollin-vale", IntakeCode.TopicLevels)]
    [InlineData("lab/hollin-vale/fir/well-1/more", IntakeCode.TopicLevels)]
    [InlineData("lab/hollin-vale/fir/", IntakeCode.UnknownChannel)]
    [InlineData("lab//fir", IntakeCode.UnknownSource)]
    [InlineData("plant/hollin-vale/fir", IntakeCode.TopicOutsideRoot)]
    [InlineData("labs/hollin-vale/fir", IntakeCode.TopicOutsideRoot)]
    [InlineData("", IntakeCode.TopicOutsideRoot)]
    [InlineData("$SYS/broker/uptime", IntakeCode.TopicReserved)]
    [InlineData("lab/$hollin-vale/fir", IntakeCode.TopicReserved)]
    [InlineData("lab/hollin-vale/fir/$x", IntakeCode.TopicReserved)]
    public void A_topic_that_leads_nowhere_is_explained(string topic, string code)
    {
        DecodedMessage decoded = DecodingBench.Decode("1", topic);
        Assert.Null(decoded.Pack);
        Assert.Equal(code, Assert.Single(decoded.Findings).Code);
    }

    [Theory]
    [InlineData("", IntakeCode.PayloadEmpty)]
    [InlineData(" \r\n\t", IntakeCode.PayloadEmpty)]
    [InlineData("12.5", IntakeCode.NotSenml)]
    [InlineData("[", IntakeCode.MalformedJson)]
    [InlineData("[{\"n\":\"well-1\",\"v\":1}", IntakeCode.MalformedJson)]
    [InlineData("[{\"n\":\"well-1\",\"v\":1}]]", IntakeCode.MalformedJson)]
    [InlineData("[{\"n\":\"well-1\",\"v\":1}] 7", IntakeCode.MalformedJson)]
    [InlineData("[{\"n\":\"well-1\",\"v\":1,}]", IntakeCode.MalformedJson)]
    [InlineData("[{\"n\":\"well-1\",\"v\":NaN}]", IntakeCode.MalformedJson)]
    [InlineData("[{\"n\":\"\\ud800\",\"v\":1}]", IntakeCode.MalformedJson)]
    [InlineData("[[[[[[[[[[[]]]]]]]]]]]", IntakeCode.NotSenml)]
    [InlineData("[{\"x\":[[[[[[[[[1]]]]]]]]]}]", IntakeCode.MalformedJson)]
    [InlineData("[7]", IntakeCode.NotSenml)]
    [InlineData("[null]", IntakeCode.NotSenml)]
    [InlineData("[{\"bver\":11,\"n\":\"well-1\",\"v\":1}]", IntakeCode.UnknownVersion)]
    [InlineData("[{\"bver\":\"10\",\"n\":\"well-1\",\"v\":1}]", IntakeCode.UnknownVersion)]
    [InlineData("[{\"n\":\"well-1\",\"v\":1,\"crucial_\":0}]", IntakeCode.MustUnderstand)]
    [InlineData("[{\"bt\":1e13,\"n\":\"well-1\",\"v\":1}]", IntakeCode.TimeOutOfRange)]
    [InlineData("[{\"bt\":\"now\",\"n\":\"well-1\",\"v\":1}]", IntakeCode.WrongType)]
    [InlineData("[{\"bn\":1,\"n\":\"well-1\",\"v\":1}]", IntakeCode.WrongType)]
    [InlineData("[{\"bn\":\"a\",\"bn\":\"\",\"n\":\"well-1\",\"v\":1}]", IntakeCode.DuplicateLabel)]
    public void An_error_that_makes_the_pack_doubtful_refuses_the_whole(string payload, string code)
    {
        DecodedMessage decoded = DecodingBench.Decode(payload);
        Assert.Null(decoded.Pack);
        Assert.Equal(code, Assert.Single(decoded.Findings).Code);
    }

    [Theory]
    [InlineData("{\"n\":\"well-9\",\"v\":1}", IntakeCode.UnknownChannel, "/1/n")]
    [InlineData("{\"v\":1}", IntakeCode.UnknownChannel, "/1/n")]
    [InlineData("{\"n\":\"well-1\"}", IntakeCode.MissingValue, "/1")]
    [InlineData("{\"n\":\"well-1\",\"s\":5}", IntakeCode.SumWithoutValue, "/1")]
    [InlineData("{\"n\":\"well-1\",\"v\":1,\"vb\":true}", IntakeCode.SeveralValues, "/1")]
    [InlineData("{\"n\":\"well-1\",\"v\":\"1\"}", IntakeCode.WrongType, "/1/v")]
    [InlineData("{\"n\":\"well-1\",\"v\":[1]}", IntakeCode.WrongType, "/1/v")]
    [InlineData("{\"n\":\"well-1\",\"v\":{}}", IntakeCode.WrongType, "/1/v")]
    [InlineData("{\"n\":\"well-1\",\"v\":true}", IntakeCode.WrongType, "/1/v")]
    [InlineData("{\"n\":\"well-1\",\"v\":1e999}", IntakeCode.ValueOutOfRange, "/1/v")]
    [InlineData("{\"n\":\"well-1\",\"v\":-1e999}", IntakeCode.ValueOutOfRange, "/1/v")]
    [InlineData("{\"n\":\"well-1\",\"vs\":\"hot\"}", IntakeCode.ValueNotNumber, "/1/vs")]
    [InlineData("{\"n\":\"well-1\",\"vb\":1}", IntakeCode.WrongType, "/1/vb")]
    [InlineData("{\"n\":\"well-1\",\"v\":1,\"v\":2}", IntakeCode.DuplicateLabel, "/1/v")]
    [InlineData("{\"n\":\"well-1\",\"u\":\"Cel\",\"v\":1}", IntakeCode.UnitMismatch, "/1/u")]
    [InlineData("{\"n\":\"well-1\",\"t\":\"x\",\"v\":1}", IntakeCode.WrongType, "/1/t")]
    [InlineData("{\"n\":\"well-1\",\"t\":1e15,\"v\":1}", IntakeCode.TimeOutOfRange, "/1/t")]
    [InlineData("{\"n\":\"well-1\",\"t\":1796113531,\"v\":1}", IntakeCode.TimeInTheFuture, "/1/t")]
    [InlineData("{\"n\":\"well-1\",\"t\":300000000,\"v\":1}", IntakeCode.TimeTooEarly, "/1/t")]
    [InlineData("{\"n\":\"well-1\",\"t\":-999999999999,\"v\":1}", IntakeCode.TimeTooEarly, "/1/t")]
    public void A_bad_record_is_refused_and_the_good_ones_are_kept(string record, string code, string where)
    {
        DecodedMessage decoded = DecodingBench.Decode($$"""[{"n":"power","t":{{Now}},"v":7},{{record}},{"n":"shell","t":{{Now}},"v":20}]""");
        Assert.Equal(["power", "shell"], decoded.Pack!.Readings.Select(reading => reading.Channel));
        Assert.Equal((code, where), (Assert.Single(decoded.Findings).Code, decoded.Findings[0].Where));
    }

    [Fact]
    public void The_channel_of_a_reading_is_the_one_string_of_the_lab()
    {
        var lab = new IntakeLab();
        Reading reading = Assert.Single(DecodingBench.Decode("""[{"n":"w\u0065ll-1","v":1}]""", lab: lab).Pack!.Readings);
        Assert.Same(lab.Current.Sources[0].Channels[0].Id, reading.Channel);
    }

    [Fact]
    public void A_name_may_be_the_channels_key_in_full()
    {
        DecodedMessage decoded = DecodingBench.Decode("""[{"bn":"hollin-vale.fir/","n":"well-2","v":100}]""");
        Assert.Equal("well-2", Assert.Single(decoded.Pack!.Readings).Channel);
    }

    [Fact]
    public void Base_value_is_added_and_a_null_stays_without_value()
    {
        DecodedMessage decoded = DecodingBench.Decode("""[{"bv":100,"n":"well-1","v":0.5},{"n":"well-2","v":null},{"n":"power","v":-1,"s":9},{"n":"shutter","vb":true}]""");
        Assert.Equal([100.5, double.NaN, 99, 1], decoded.Pack!.Readings.Select(reading => reading.Value));
        Assert.Equal(
            [ReadingQuality.None, ReadingQuality.NoValue, ReadingQuality.None, ReadingQuality.None],
            decoded.Pack.Readings.Select(reading => reading.Quality & ~ReadingQuality.StampedOnArrival));
        Assert.Empty(decoded.Findings);
    }

    [Fact]
    public void A_sum_of_base_value_and_value_that_overflows_is_refused()
    {
        DecodedMessage decoded = DecodingBench.Decode("""[{"bv":1.7e308,"n":"well-2","v":1.7e308}]""");
        Assert.Equal(IntakeCode.ValueOutOfRange, Assert.Single(decoded.Findings).Code);
        Assert.Null(decoded.Pack);
    }

    [Theory]
    [InlineData("9.999", ReadingQuality.OutsideSensorRange)]
    [InlineData("10", ReadingQuality.None)]
    [InlineData("400", ReadingQuality.None)]
    [InlineData("400.1", ReadingQuality.OutsideSensorRange)]
    public void A_value_outside_the_sensors_range_is_flagged(string value, ReadingQuality quality)
    {
        DecodedMessage decoded = DecodingBench.Decode($$"""[{"n":"well-1","t":{{Now}},"v":{{value}}}]""");
        Assert.Equal(quality, Assert.Single(decoded.Pack!.Readings).Quality);
    }

    [Theory]
    [InlineData(0, ReadingQuality.None)]
    [InlineData(5_000_000, ReadingQuality.None)]
    [InlineData(5_000_001, ReadingQuality.FromTheFuture)]
    [InlineData(600_000_000, ReadingQuality.FromTheFuture)]
    [InlineData(-60_000_000, ReadingQuality.None)]
    [InlineData(-60_000_001, ReadingQuality.Late)]
    public void Device_time_is_judged_against_arrival(long offsetMicroseconds, ReadingQuality quality)
    {
        decimal seconds = (DecodingBench.Arrival.Microseconds + offsetMicroseconds) / 1_000_000m;
        DecodedMessage decoded = DecodingBench.Decode(string.Create(CultureInfo.InvariantCulture, $$"""[{"n":"well-2","t":{{seconds}},"v":1}]"""));
        Assert.Equal(new Reading("well-2", DecodingBench.Arrival + TimeSpan.FromMicroseconds(offsetMicroseconds), 1, quality), Assert.Single(decoded.Pack!.Readings));
    }

    [Theory]
    [InlineData("268435455.9", true)]
    [InlineData("268435456", false)]
    public void Times_below_two_to_the_28_are_relative_to_arrival(string time, bool relative)
    {
        // Both are refused, for opposite reasons: 8.5 years in the future, and 1978 (RFC 8428 section 4.5.3).
        DecodedMessage decoded = DecodingBench.Decode($$"""[{"n":"well-2","t":{{time}},"v":1}]""");
        Assert.Equal(relative ? IntakeCode.TimeInTheFuture : IntakeCode.TimeTooEarly, Assert.Single(decoded.Findings).Code);
    }

    [Fact]
    public void A_relative_time_counts_from_arrival_and_is_flagged()
    {
        DecodedMessage decoded = DecodingBench.Decode("""[{"bt":-2,"n":"well-2","t":-0.5,"v":1}]""");
        Assert.Equal(
            new Reading("well-2", DecodingBench.Arrival - TimeSpan.FromSeconds(2.5), 1, ReadingQuality.StampedOnArrival), Assert.Single(decoded.Pack!.Readings));
    }

    [Theory]
    [InlineData("""[{"n":"well-1","v":20}]""", IntakeLab.Topic)]
    [InlineData("""[{"n":"well-1","t":-5,"v":20}]""", IntakeLab.Topic)]
    [InlineData("20", IntakeLab.Topic + "/well-1")]
    public void Retained_input_without_a_device_time_is_never_a_reading(string payload, string topic)
    {
        DecodedMessage decoded = DecodingBench.Decode(payload, topic, retained: true);
        Assert.Null(decoded.Pack);
        Assert.Equal(IntakeCode.RetainedWithoutTime, Assert.Single(decoded.Findings).Code);
    }

    [Fact]
    public void Retained_input_with_a_device_time_is_a_reading() =>
        Assert.Single(DecodingBench.Decode($$"""[{"n":"well-1","t":{{Now}},"v":20}]""", retained: true).Pack!.Readings);

    [Theory]
    [InlineData("20.25", 20.25)]
    [InlineData(" -1.5e2\n", -150)]
    [InlineData("+7", 7)]
    [InlineData(".5", 0.5)]
    [InlineData("NaN", double.NaN)]
    [InlineData("null", double.NaN)]
    public void A_bare_number_on_a_channels_topic_is_stamped_on_arrival(string payload, double value)
    {
        Reading reading = Assert.Single(DecodingBench.Decode(payload, IntakeLab.Topic + "/power").Pack!.Readings);
        ReadingQuality quality = double.IsNaN(value) ? ReadingQuality.NoValue | ReadingQuality.StampedOnArrival : ReadingQuality.StampedOnArrival;
        Assert.Equal(new Reading("power", DecodingBench.Arrival, value, quality), reading);
    }

    [Theory]
    [InlineData("Infinity", IntakeCode.ValueNotNumber)]
    [InlineData("-Infinity", IntakeCode.ValueNotNumber)]
    [InlineData("1e999", IntakeCode.ValueOutOfRange)]
    [InlineData("1,5", IntakeCode.ValueNotNumber)]
    [InlineData("1 2", IntakeCode.ValueNotNumber)]
    [InlineData("0x10", IntakeCode.ValueNotNumber)]
    [InlineData("on", IntakeCode.ValueNotNumber)]
    [InlineData("1e", IntakeCode.ValueNotNumber)]
    [InlineData("00000000000000000000000000000000000000000000000000000000000000001", IntakeCode.ValueNotNumber)]
    public void What_is_no_number_is_refused(string payload, string code) =>
        Assert.Equal(code, Assert.Single(DecodingBench.Decode(payload, IntakeLab.Topic + "/power").Findings).Code);

    [Theory]
    [InlineData("""{"v":5}""")]
    [InlineData("""[{"v":5}]""")]
    [InlineData("""[{"n":"power","u":"W","v":5}]""")]
    public void A_channels_topic_takes_a_record_with_or_without_name(string payload) =>
        Assert.Equal("power", Assert.Single(DecodingBench.Decode(payload, IntakeLab.Topic + "/power").Pack!.Readings).Channel);

    [Fact]
    public void A_channels_topic_refuses_a_record_of_another_channel() =>
        Assert.Equal(IntakeCode.UnknownChannel, Assert.Single(DecodingBench.Decode("""{"n":"shell","v":5}""", IntakeLab.Topic + "/power").Findings).Code);

    [Fact]
    public void What_is_not_utf_8_is_refused()
    {
        byte[] payload = [.. "[{\"n\":\"well-1\",\"x\":\""u8, 0xC3, 0x28, .. "\",\"v\":1}]"u8];
        DecodedMessage decoded = DecodingBench.Decode(payload, IntakeLab.Topic, false, DecodingBench.Decoder());
        Assert.Equal(IntakeCode.NotUtf8, Assert.Single(decoded.Findings).Code);
    }

    [Fact]
    public void A_byte_order_mark_is_passed_over() =>
        Assert.NotNull(DecodingBench.Decode("\uFEFF[{\"n\":\"well-1\",\"v\":20}]").Pack);

    [Fact]
    public void Limits_hold()
    {
        PayloadDecoder decoder = DecodingBench.Decoder(limits: new PayloadLimits { MaximumBytes = 200, MaximumRecords = 3 });
        string four = "[" + string.Join(',', Enumerable.Repeat("""{"n":"well-1","v":1}""", 4)) + "]";
        Assert.Equal(IntakeCode.TooManyRecords, Assert.Single(DecodingBench.Decode(Encoding.UTF8.GetBytes(four), IntakeLab.Topic, false, decoder).Findings).Code);
        Assert.Equal(IntakeCode.PayloadTooLarge, Assert.Single(DecodingBench.Decode(new byte[201], IntakeLab.Topic, false, decoder).Findings).Code);
    }

    [Fact]
    public void The_findings_of_a_hostile_pack_are_bounded()
    {
        string pack = "[" + string.Join(',', Enumerable.Repeat("""{"n":"no-such","v":1}""", 1000)) + "]";
        DecodedMessage decoded = DecodingBench.Decode(pack);
        Assert.Equal(FindingList.Limit + 1, decoded.Findings.Count);
        Assert.Equal((IntakeCode.MoreFindings, "984"), (decoded.Findings[^1].Code, decoded.Findings[^1].Value));
    }

    [Fact]
    public void A_changed_lab_counts_at_once()
    {
        var lab = new IntakeLab();
        PayloadDecoder decoder = DecodingBench.Decoder(lab);
        byte[] payload = """[{"n":"new","v":1}]"""u8.ToArray();
        Assert.Null(DecodingBench.Decode(payload, IntakeLab.Topic, false, decoder).Pack);
        lab.Current = IntakeLab.Snapshot(IntakeLab.Channel("new", "W"));
        Assert.NotNull(DecodingBench.Decode(payload, IntakeLab.Topic, false, decoder).Pack);
    }

    [Fact]
    public void An_empty_pack_and_a_record_of_base_values_are_no_error()
    {
        Assert.Equal(new DecodedMessage(null, []), DecodingBench.Decode("[]"));
        DecodedMessage decoded = DecodingBench.Decode($$"""[{"bt":{{Now}},"bu":"Ohm"},{"n":"well-1","v":100}]""");
        Assert.Equal(new Reading("well-1", DecodingBench.Arrival, 100), Assert.Single(decoded.Pack!.Readings));
    }
}
