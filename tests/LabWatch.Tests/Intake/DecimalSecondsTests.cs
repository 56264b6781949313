using System.Globalization;
using System.Numerics;
using System.Text;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;
using LabWatch.Intake.Payloads;

namespace LabWatch.Tests.Intake;

public class DecimalSecondsTests
{
    [Theory]
    [InlineData("0", 0, 0)]
    [InlineData("-0", 0, 0)]
    [InlineData("1.276020076001e+09", 1_276_020_076_001_000, 0)]
    [InlineData("1.320067464E9", 1_320_067_464_000_000, 0)]
    [InlineData("1796115330.1234567", 1_796_115_330_123_456, 700_000_000_000)]
    [InlineData("1796115330.9999999999", 1_796_115_330_999_999, 999_900_000_000)]
    [InlineData("-0.0000001", -1, 900_000_000_000)]
    [InlineData("-5", -5_000_000, 0)]
    [InlineData("999999999999.999999", 999_999_999_999_999_999, 0)]
    [InlineData("0.000000000000000001", 0, 1)]
    [InlineData("0.0000000000000000019", 0, 1)]
    [InlineData("1e-400", 0, 0)]
    [InlineData("0e99999999999", 0, 0)]
    [InlineData("123456e-3", 123_456_000, 0)]
    public void A_number_is_read_as_decimal_and_truncated(string text, long microseconds, long attoseconds)
    {
        Assert.True(DecimalSeconds.TryParse(Encoding.UTF8.GetBytes(text), out DecimalSeconds seconds));
        Assert.Equal(new DecimalSeconds(microseconds, attoseconds), seconds);
    }

    [Theory]
    [InlineData("1e12")]
    [InlineData("-1e12")]
    [InlineData("1000000000000")]
    [InlineData("1e999999999999")]
    [InlineData("0.1e14")]
    public void A_time_beyond_the_range_is_refused(string text) =>
        Assert.False(DecimalSeconds.TryParse(Encoding.UTF8.GetBytes(text), out _));

    [Fact]
    public void A_sum_is_exact_before_it_is_truncated()
    {
        // 0.0000005 + 0.0000005 is one microsecond; truncated one by one both would be none.
        Assert.True(DecimalSeconds.TryParse("0.0000005"u8, out DecimalSeconds half));
        Assert.Equal(new DecimalSeconds(1, 0), half + half);
    }

    [Property(MaxTest = 500, Replay = "(1,1)")]
    public Property Reading_agrees_with_exact_integer_arithmetic() =>
        Prop.ForAll(
            ArbMap.Default.GeneratorFor<long>().Zip(ArbMap.Default.GeneratorFor<byte>()).ToArbitrary(),
            pair =>
            {
                // mantissa x 10^exponent, against BigInteger: floor(value x 10^6) and the rest in units of 10^-18.
                (long mantissa, byte size) = pair;
                mantissa %= 1_000_000_000;
                int exponent = (size % 25) - 21;
                string text = string.Create(CultureInfo.InvariantCulture, $"{mantissa}e{exponent}");
                Assert.True(DecimalSeconds.TryParse(Encoding.UTF8.GetBytes(text), out DecimalSeconds seconds));
                BigInteger atto = exponent + 18 >= 0
                    ? mantissa * BigInteger.Pow(10, exponent + 18)
                    : mantissa / BigInteger.Pow(10, -exponent - 18);
                Assert.Equal(atto, (seconds.Microseconds * BigInteger.Pow(10, 12)) + seconds.Attoseconds);
                Assert.InRange(seconds.Attoseconds, 0, 999_999_999_999);
            });
}
