using System.Globalization;
using System.Text;
using System.Text.Json.Nodes;
using FsCheck.Xunit;
using LabWatch.Records.Audit;

namespace LabWatch.Tests.Records;

/// <summary>Against the examples of RFC 8785 (JSON Canonicalization Scheme, 2020), from memory, each recomputed here.</summary>
public sealed class CanonicalJsonTests
{
    /// <summary>RFC 8785, Appendix B, Table 1: bits of the double, and its canonical text.</summary>
    [Theory]
    [InlineData(0x0000000000000000, "0")]
    [InlineData(0x8000000000000000, "0")]
    [InlineData(0x0000000000000001, "5e-324")]
    [InlineData(0x8000000000000001, "-5e-324")]
    [InlineData(0x7fefffffffffffff, "1.7976931348623157e+308")]
    [InlineData(0xffefffffffffffff, "-1.7976931348623157e+308")]
    [InlineData(0x4340000000000000, "9007199254740992")]
    [InlineData(0xc340000000000000, "-9007199254740992")]
    [InlineData(0x4430000000000000, "295147905179352830000")]
    [InlineData(0x44b52d02c7e14af5, "9.999999999999997e+22")]
    [InlineData(0x44b52d02c7e14af6, "1e+23")]
    [InlineData(0x44b52d02c7e14af7, "1.0000000000000001e+23")]
    [InlineData(0x444b1ae4d6e2ef4e, "999999999999999700000")]
    [InlineData(0x444b1ae4d6e2ef4f, "999999999999999900000")]
    [InlineData(0x444b1ae4d6e2ef50, "1e+21")]
    [InlineData(0x3eb0c6f7a0b5ed8c, "9.999999999999997e-7")]
    [InlineData(0x3eb0c6f7a0b5ed8d, "0.000001")]
    [InlineData(0x41b3de4355555553, "333333333.3333332")]
    [InlineData(0x41b3de4355555554, "333333333.33333325")]
    [InlineData(0x41b3de4355555555, "333333333.3333333")]
    [InlineData(0x41b3de4355555556, "333333333.3333334")]
    [InlineData(0x41b3de4355555557, "333333333.33333343")]
    [InlineData(0xbecbf647612f3696, "-0.0000033333333333333333")]
    [InlineData(0x43143ff3c1cb0959, "1424953923781206.2")]
    public void Numbers_are_written_as_in_the_rfc(ulong bits, string expected) =>
        Assert.Equal(expected, Text(JsonValue.Create(BitConverter.UInt64BitsToDouble(bits))));

    /// <summary>RFC 8785, section 3.2.3: the sorting example.</summary>
    [Fact]
    public void Members_are_sorted_by_utf_16_code_units()
    {
        JsonObject content = new()
        {
            ["\u20ac"] = "Euro Sign",
            ["\r"] = "Carriage Return",
            ["\ufb33"] = "Hebrew Letter Dalet With Dagesh",
            ["1"] = "One",
            ["\ud83d\ude00"] = "Emoji: Grinning Face",
            ["\u0080"] = "Control",
            ["\u00f6"] = "Latin Small Letter O With Diaeresis",
        };
        Assert.Equal(
            "{\"\\r\":\"Carriage Return\",\"1\":\"One\",\"\u0080\":\"Control\",\"\u00f6\":\"Latin Small Letter O With Diaeresis\",\"\u20ac\":\"Euro Sign\",\"\ud83d\ude00\":\"Emoji: Grinning Face\",\"\ufb33\":\"Hebrew Letter Dalet With Dagesh\"}",
            Text(content));
    }

    /// <summary>RFC 8785, section 3.2.2: the serialisation example.</summary>
    [Fact]
    public void The_example_of_section_3_2_2_is_met()
    {
        JsonNode content = JsonNode.Parse("""
            {
              "numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
              "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/",
              "literals": [null, true, false]
            }
            """)!;
        Assert.Equal(
            """{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}""",
            Text(content));
    }

    [Fact]
    public void Half_a_surrogate_pair_and_numbers_that_are_not_finite_are_refused()
    {
        Assert.Throws<ArgumentException>(() => CanonicalJson.Write(JsonValue.Create("\ud800")));
        Assert.Throws<ArgumentException>(() => CanonicalNumber.Write(double.NaN));
        Assert.Throws<ArgumentException>(() => CanonicalNumber.Write(double.PositiveInfinity));
    }

    [Property(MaxTest = 2000)]
    public bool Every_number_reads_back_as_itself(long bits)
    {
        double number = BitConverter.Int64BitsToDouble(bits);
        return !double.IsFinite(number)
            || double.Parse(CanonicalNumber.Write(number), CultureInfo.InvariantCulture).Equals(number == 0 ? 0 : number);
    }

    private static string Text(JsonNode? content) => Encoding.UTF8.GetString(CanonicalJson.Write(content));
}
