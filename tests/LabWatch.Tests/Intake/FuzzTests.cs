using System.Text;
using LabWatch.Intake.Payloads;

namespace LabWatch.Tests.Intake;

/// <summary>Hostile bytes, seeded: never an exception, never more memory than the payload warrants, always readings or findings that hold.</summary>
public class FuzzTests
{
    private static readonly string[] Seeds =
    [
        """[{"bn":"","bt":1796112930.25,"n":"well-1","u":"Ohm","v":107.793},{"n":"well-2","v":107.8},{"n":"power","u":"W","v":55},{"n":"shutter","vb":true}]""",
        """[{"n":"well-1","t":-5,"v":1.2},{"n":"well-1","t":-4,"v":null},{"n":"shell","vs":"x"},{"n":"power","s":1.5e3}]""",
        """{"n":"hollin-vale.fir/power","u":"W","t":1796112930,"v":-12.5e-3,"ut":60,"bver":10}""",
        """[{"n":"w\u0065ll-1","x":{"y":[1,2,{"z":null}]},"v":1}]""",
        "107.793",
    ];

    private static readonly byte[][] Tokens =
    [
        .. new[]
        {
            "\"", "\\", "\\ud800", "{", "}", "[", "]", ",", ":", "null", "true", "1e999", "-", "0", "9999999999999999999999", "\"bt\":", "\"v\":", "\"n\":\"well-1\"",
            "\0", "\uFEFF", "\"a_\":1", "e", ".", "\"bver\":11", "1e-9999999", "\u2028",
        }.Select(Encoding.UTF8.GetBytes),
        [0xFF],
        [0xC0, 0x80],
        [0xED, 0xA0, 0x80],
    ];

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Mutated_payloads_give_readings_or_findings(int seed)
    {
        var random = new Random(seed);
        PayloadDecoder decoder = DecodingBench.Decoder();
        for (int i = 0; i < 10_000; i++)
        {
            byte[] payload = Mutate(Encoding.UTF8.GetBytes(Seeds[random.Next(Seeds.Length)]), random);
            string topic = random.Next(3) == 0 ? IntakeLab.Topic + "/well-1" : IntakeLab.Topic;
            bool retained = random.Next(4) == 0;
            long before = GC.GetAllocatedBytesForCurrentThread();
            DecodedMessage decoded = DecodingBench.Decode(payload, topic, retained, decoder);
            long allocated = GC.GetAllocatedBytesForCurrentThread() - before;
            Assert.True(allocated < 64_000 + (64 * payload.Length), $"{allocated} bytes for {Encoding.Latin1.GetString(payload)}");
            Check(decoded, payload);
        }
    }

    [Theory]
    [InlineData(11)]
    [InlineData(12)]
    public void Mutated_packs_in_cbor_give_readings_or_findings(int seed)
    {
        var random = new Random(seed);
        PayloadDecoder decoder = DecodingBench.Decoder();
        byte[][] seeds = [CborPack.Rfc8428Section6, CborPack.Of(("well-1", 107.793, 1_796_112_930), ("well-2", 107.8, 1_796_112_931), ("power", 55, 1_796_112_932))];
        for (int i = 0; i < 10_000; i++)
        {
            byte[] payload = Mutate(seeds[random.Next(seeds.Length)], random);
            long before = GC.GetAllocatedBytesForCurrentThread();
            DecodedMessage decoded = DecodingBench.Decode(payload, IntakeLab.Topic, false, decoder);
            long allocated = GC.GetAllocatedBytesForCurrentThread() - before;
            Assert.True(allocated < 64_000 + (64 * payload.Length), $"{allocated} bytes for {Convert.ToHexString(payload)}");
            Check(decoded, payload);
        }
    }

    [Fact]
    public void Every_cut_of_a_pack_in_cbor_is_refused_whole()
    {
        byte[] payload = CborPack.Of(("well-1", 107.793, 1_796_112_930), ("power", 55, 1_796_112_932));
        PayloadDecoder decoder = DecodingBench.Decoder();
        for (int length = 0; length < payload.Length; length++)
        {
            DecodedMessage decoded = DecodingBench.Decode(payload[..length], IntakeLab.Topic, false, decoder);
            Assert.Null(decoded.Pack);
            Assert.NotEmpty(decoded.Findings);
        }
    }

    [Fact]
    public void Random_bytes_give_findings()
    {
        var random = new Random(5);
        PayloadDecoder decoder = DecodingBench.Decoder();
        for (int i = 0; i < 5_000; i++)
        {
            byte[] payload = new byte[random.Next(200)];
            random.NextBytes(payload);
            Check(DecodingBench.Decode(payload, IntakeLab.Topic, false, decoder), payload);
        }
    }

    [Fact]
    public void Every_cut_of_a_pack_is_refused_whole()
    {
        byte[] payload = Encoding.UTF8.GetBytes(Seeds[0]);
        PayloadDecoder decoder = DecodingBench.Decoder();
        for (int length = 0; length < payload.Length; length++)
        {
            DecodedMessage decoded = DecodingBench.Decode(payload[..length], IntakeLab.Topic, false, decoder);
            Assert.Null(decoded.Pack);
            Assert.NotEmpty(decoded.Findings);
        }
    }

    [Fact]
    public void A_clean_pack_allocates_little_more_than_its_readings()
    {
        PayloadDecoder decoder = DecodingBench.Decoder();
        byte[] payload = Encoding.UTF8.GetBytes("[" + string.Join(',', Enumerable.Repeat("""{"n":"well-1","t":1796112930,"v":107.793}""", 60)) + "]");
        DecodingBench.Decode(payload, IntakeLab.Topic, false, decoder);
        long before = GC.GetAllocatedBytesForCurrentThread();
        DecodedMessage decoded = DecodingBench.Decode(payload, IntakeLab.Topic, false, decoder);
        long allocated = GC.GetAllocatedBytesForCurrentThread() - before;
        Assert.Equal(60, decoded.Pack!.Readings.Count);
        Assert.True(allocated < (60 * 40) + 500, $"{allocated} bytes");
    }

    private static void Check(DecodedMessage decoded, byte[] payload)
    {
        Assert.True(decoded.Findings.Count <= FindingList.Limit + 1);
        Assert.All(decoded.Findings, finding =>
        {
            Assert.NotEmpty(finding.Code);
            Assert.NotEmpty(finding.Cure);
            Assert.True((finding.Value?.Length ?? 0) <= LabWatch.Lab.Findings.Finding.MaximumQuotedLength + 3);
        });
        if (decoded.Pack is { } pack)
        {
            Assert.NotEmpty(pack.Readings);
            Assert.All(pack.Readings, reading =>
            {
                Assert.Equal(double.IsNaN(reading.Value), reading.Quality.HasFlag(LabWatch.Lab.Readings.ReadingQuality.NoValue));
                Assert.False(double.IsInfinity(reading.Value));
            });
        }
        else if (decoded.Findings.Count == 0)
        {
            // Only a pack of nothing, or of base values, may leave no trace.
            Assert.Contains((byte)'[', payload.Concat("["u8.ToArray()));
            Assert.DoesNotContain("\"v\":1", Encoding.Latin1.GetString(payload), StringComparison.Ordinal);
        }
    }

    private static byte[] Mutate(byte[] payload, Random random)
    {
        var bytes = new List<byte>(payload);
        for (int edits = random.Next(1, 5); edits > 0; edits--)
        {
            int at = random.Next(bytes.Count + 1);
            switch (random.Next(5))
            {
                case 0 when bytes.Count > 0:
                    bytes[Math.Min(at, bytes.Count - 1)] ^= (byte)(1 << random.Next(8));
                    break;
                case 1:
                    bytes.InsertRange(at, Tokens[random.Next(Tokens.Length)]);
                    break;
                case 2:
                    bytes.RemoveRange(at, Math.Min(random.Next(8), bytes.Count - at));
                    break;
                case 3:
                    bytes.InsertRange(at, bytes.GetRange(at, Math.Min(random.Next(40), bytes.Count - at)));
                    break;
                default:
                    bytes.RemoveRange(at, bytes.Count - at);
                    break;
            }
        }

        return [.. bytes];
    }
}
