using System.Text;
using System.Text.Json;
using LabWatch.Lab.Time;
using LabWatch.Simulator;

namespace LabWatch.Tests.Simulator;

public sealed class SenmlWriterTests
{
    private static readonly SenmlWriter Writer = new(DemoLab.Designs);

    private static string Write(Instant time, params (int Channel, long Scaled)[] values)
    {
        long?[] all = new long?[DemoLab.Designs[0].Channels.Count];
        foreach ((int channel, long scaled) in values)
        {
            all[channel] = scaled;
        }

        return Encoding.UTF8.GetString(Writer.Write(0, time, all));
    }

    [Theory]
    [InlineData(10012345, "100.12345")]
    [InlineData(10012300, "100.123")]
    [InlineData(10000000, "100")]
    [InlineData(0, "0")]
    [InlineData(7, "0.00007")]
    [InlineData(-7, "-0.00007")]
    [InlineData(-2012345, "-20.12345")]
    public void Write_FiveDecimals_PrintsTheExactDecimal(long scaled, string expected) =>
        Assert.Equal($"[{{\"bt\":1796120171,\"n\":\"well-bottom\",\"u\":\"Ohm\",\"v\":{expected}}}]", Write(Instant.FromUnixSeconds(1796120171), (0, scaled)));

    [Fact]
    public void Write_FractionOfASecond_StandsInTheBaseTime() =>
        Assert.Contains("\"bt\":1796120171.4,", Write(new Instant(1796120171_400_000), (0, 1)), StringComparison.Ordinal);

    [Fact]
    public void Write_AllSilent_IsAnEmptyPack() => Assert.Equal("[]", Write(default));

    // Source: RFC 8428, section 5 (labels n, u, v, bt; base fields apply to the records that follow).
    [Fact]
    public void Write_SilentFirstChannel_PutsTheBaseTimeIntoTheFirstRecordThatIsThere()
    {
        using JsonDocument pack = JsonDocument.Parse(Write(Instant.FromUnixSeconds(5), (3, -1250), (4, 2000)));
        Assert.Equal(2, pack.RootElement.GetArrayLength());
        Assert.Equal(5, pack.RootElement[0].GetProperty("bt").GetDouble());
        Assert.Equal(-1.25, pack.RootElement[0].GetProperty("v").GetDouble());
        Assert.False(pack.RootElement[1].TryGetProperty("bt", out _));
    }
}
