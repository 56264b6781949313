using LabWatch.Intake.Payloads;
using LabWatch.Intake.Units;
using LabWatch.Lab.Readings;

namespace LabWatch.Tests.Intake;

/// <summary>Units that devices send, against published conversions.</summary>
public class UnitTests
{
    // Sources: SI Brochure, 9th edition (2019), section 2.3.1 (t/degC = T/K - 273.15), table 7 (prefixes), table 8 (litre, minute, hour);
    // NIST SP 811 (2008) appendix B.8 and B.9 (degree Fahrenheit, bar, standard atmosphere); RFC 8798 table 1 (secondary units).
    [Theory]
    [InlineData("K", "Cel", 300.15, 27)]
    [InlineData("mK", "Cel", 273150, 0)]
    [InlineData("[degF]", "Cel", 212, 100)]
    [InlineData("[degF]", "Cel", -40, -40)]
    [InlineData("mOhm", "Ohm", 107793.5, 107.7935)]
    [InlineData("kOhm", "Ohm", 0.1077935, 107.7935)]
    [InlineData("mV", "V", 55.2, 0.0552)]
    [InlineData("uV", "mV", 5500, 5.5)]
    [InlineData("nA", "A", 12, 12e-9)]
    [InlineData("kW", "W", 1.2, 1200)]
    [InlineData("hPa", "Pa", 1013.25, 101325)]
    [InlineData("mbar", "hPa", 1013.25, 1013.25)]
    [InlineData("bar", "Pa", 1, 100000)]
    [InlineData("atm", "hPa", 1, 1013.25)]
    [InlineData("%", "/", 20.9, 0.209)]
    [InlineData("/", "%", 0.209, 20.9)]
    [InlineData("ppm", "%", 209000, 20.9)]
    [InlineData("l/s", "l/min", 0.25, 15)]
    [InlineData("m3/h", "l/min", 0.6, 10)]
    [InlineData("mL/min", "l/min", 500, 0.5)]
    [InlineData("Hz", "1/min", 2, 120)]
    [InlineData("%{RH}", "%RH", 45, 45)]
    public void A_unit_becomes_another_exactly(string from, string to, double value, double expected) =>
        Assert.Equal(expected, UnitTable.Find(from, to)!.Convert(value));

    [Theory]
    [InlineData("Cel", "Ohm")]
    [InlineData("%RH", "%")]
    [InlineData("furlong", "Cel")]
    [InlineData("cel", "Cel")]
    [InlineData("W", "furlong")]
    public void Units_of_different_quantities_or_unknown_ones_become_nothing(string from, string to) => Assert.Null(UnitTable.Find(from, to));

    [Fact]
    public void A_conversion_is_exact_there_and_back_where_the_decimals_fit()
    {
        var random = new Random(5);
        UnitConversion there = UnitTable.Find("kOhm", "Ohm")!;
        UnitConversion back = UnitTable.Find("Ohm", "kOhm")!;
        for (int i = 0; i < 1_000; i++)
        {
            double value = random.Next(1, 1_000_000) / 1e4;
            Assert.Equal(value, back.Convert(there.Convert(value)));
        }
    }

    [Theory]
    [InlineData(1e300)]
    [InlineData(-4e-300)]
    [InlineData(double.NaN)]
    public void A_value_beyond_decimals_is_converted_in_binary(double value) => Assert.Equal(value * 1000, UnitTable.Find("kOhm", "Ohm")!.Convert(value));

    [Fact]
    public void A_converted_reading_is_in_the_channels_unit_and_says_so()
    {
        DecodedMessage decoded = DecodingBench.Decode("""[{"n":"shell","u":"K","v":300.15},{"n":"well-1","u":"Ohm","v":107.7}]""");
        Assert.Empty(decoded.Findings);
        Assert.Equal([27, 107.7], decoded.Pack!.Readings.Select(reading => reading.Value));
        Assert.Equal([true, false], decoded.Pack.Readings.Select(reading => (reading.Quality & ReadingQuality.Converted) != 0));
    }

    [Fact]
    public void The_base_value_is_added_before_the_conversion()
    {
        DecodedMessage decoded = DecodingBench.Decode("""[{"bv":273.15,"bu":"K","n":"shell","v":27}]""");
        Assert.Equal(27, Assert.Single(decoded.Pack!.Readings).Value);
    }

    [Fact]
    public void An_unknown_unit_refuses_its_record_alone()
    {
        DecodedMessage decoded = DecodingBench.Decode("""[{"n":"shell","u":"furlong","v":1},{"n":"shell","u":"W","v":1},{"n":"well-1","v":107.7}]""");
        Assert.Equal([IntakeCode.UnknownUnit, IntakeCode.UnitMismatch], decoded.Findings.Select(finding => finding.Code));
        Assert.Single(decoded.Pack!.Readings);
    }
}
