using System.Formats.Cbor;
using System.Numerics;
using System.Text;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;
using LabWatch.Intake.Payloads;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;

namespace LabWatch.Tests.Intake;

/// <summary>SenML in CBOR (RFC 8428 section 6, RFC 8949) means what the same pack means in JSON.</summary>
public class SenmlCborTests
{
    [Fact]
    public void The_example_of_section_6_gives_the_readings_of_section_5_1_2()
    {
        IntakeLab lab = new(IntakeLab.Channel("urn:dev:ow:10e2073a0108006:voltage", "V"), IntakeLab.Channel("urn:dev:ow:10e2073a0108006:current", "A"));
        const string Json =
            """
            [
              {"bn":"urn:dev:ow:10e2073a0108006:","bt":1.276020076001e+09,"bu":"A","bver":5,"n":"voltage","u":"V","v":120.1},
              {"n":"current","t":-5,"v":1.2},{"n":"current","t":-4,"v":1.3},{"n":"current","t":-3,"v":1.4},
              {"n":"current","t":-2,"v":1.5},{"n":"current","t":-1,"v":1.6},{"n":"current","v":1.7}
            ]
            """;
        DecodedMessage expected = DecodingBench.Decode(Json, lab: lab);

        DecodedMessage decoded = DecodingBench.Decode(CborPack.Rfc8428Section6, IntakeLab.Topic, false, DecodingBench.Decoder(lab));

        Assert.Equal(7, decoded.Pack!.Readings.Count);
        Assert.Equal(expected.Pack!.Readings, decoded.Pack.Readings);
        Assert.Empty(decoded.Findings);
    }

    [Property(Replay = "(8428,1)")]
    public Property Every_double_comes_through_exactly() => Prop.ForAll(ArbMap.Default.ArbFor<DoNotSize<long>>(), bits =>
    {
        double value = BitConverter.Int64BitsToDouble(bits.Item);
        DecodedMessage decoded = Decode(CborPack.Of(("well-1", value, 1_796_112_930)));
        return double.IsNaN(value) ? decoded.Pack!.Readings[0].Quality.HasFlag(ReadingQuality.NoValue)
            : double.IsInfinity(value) ? decoded.Findings[0].Code == IntakeCode.ValueOutOfRange
            : decoded.Pack!.Readings[0].Value == value;
    });

    [Fact]
    public void A_decimal_fraction_keeps_its_digits()
    {
        byte[] payload = CborPack.WithValue(writer =>
        {
            writer.WriteTag(CborTag.DecimalFraction);
            writer.WriteStartArray(2);
            writer.WriteInt32(-3);
            writer.WriteInt32(107_793);
            writer.WriteEndArray();
        });

        Assert.Equal(107.793, Decode(payload).Pack!.Readings[0].Value);
    }

    [Fact]
    public void Whole_numbers_of_any_size_and_half_floats_are_values()
    {
        Assert.Equal(-7, Decode(CborPack.WithValue(writer => writer.WriteInt32(-7))).Pack!.Readings[0].Value);
        Assert.Equal(ulong.MaxValue, Decode(CborPack.WithValue(writer => writer.WriteUInt64(ulong.MaxValue))).Pack!.Readings[0].Value);
        Assert.Equal(-1e30, Decode(CborPack.WithValue(writer => writer.WriteBigInteger(BigInteger.Parse("-1000000000000000000000000000000", System.Globalization.CultureInfo.InvariantCulture)))).Pack!.Readings[0].Value);
        Assert.Equal(1.5, Decode(CborPack.WithValue(writer => writer.WriteHalf((Half)1.5))).Pack!.Readings[0].Value);
    }

    [Theory]
    [InlineData("81a1006677656c6c2d31", IntakeCode.MissingValue)]
    [InlineData("81a2006677656c6c2d310363616263", IntakeCode.ValueNotNumber)]
    [InlineData("81a2006677656c6c2d310843010203", IntakeCode.ValueNotNumber)]
    [InlineData("81a3006677656c6c2d3102010202", IntakeCode.DuplicateLabel)]
    [InlineData("81a3200b006677656c6c2d310201", IntakeCode.UnknownVersion)]
    [InlineData("8101", IntakeCode.NotSenml)]
    [InlineData("818181818181818181818181818180", IntakeCode.MalformedCbor)]
    [InlineData("81a2006677656c6c2d310201ff", IntakeCode.MalformedCbor)]
    [InlineData("81a1f600", IntakeCode.MalformedCbor)]
    public void What_is_wrong_is_told(string hex, string code)
    {
        DecodedMessage decoded = Decode(Convert.FromHexString(hex));

        Assert.Null(decoded.Pack);
        Finding finding = Assert.Single(decoded.Findings);
        Assert.Equal(code, finding.Code);
    }

    [Fact]
    public void A_text_key_stands_for_its_label_and_an_unknown_one_is_passed_over()
    {
        CborWriter writer = new();
        writer.WriteStartArray(null);
        writer.WriteStartMap(null);
        writer.WriteTextString("n");
        writer.WriteTextString("well-1");
        writer.WriteTextString("v");
        writer.WriteDouble(5);
        writer.WriteTextString("vendor");
        writer.WriteByteString(Encoding.ASCII.GetBytes("x"));
        writer.WriteInt32(77);
        writer.WriteNull();
        writer.WriteEndMap();
        writer.WriteEndArray();

        Assert.Equal(5, Decode(writer.Encode()).Pack!.Readings[0].Value);
    }

    private static DecodedMessage Decode(byte[] payload) => DecodingBench.Decode(payload, IntakeLab.Topic, false, DecodingBench.Decoder());
}
