using System.Buffers;
using System.Text;
using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.SystemTests.Reliability;

namespace LabWatch.SystemTests.Intake;

/// <summary>
/// Mutated payloads through every decoder, seeded by the corpus in this folder: whatever comes gives readings or findings, in bounded time and
/// memory. A payload that ever broke a decoder is added to the corpus, which also goes through as it is.
/// </summary>
public class PayloadFuzzTests
{
    private const int Seed = 20261201;
    private const int LongestPayload = 4_000;
    private static readonly Instant Arrival = Instant.FromUnixSeconds(1_796_112_931);
    private static readonly TimeSpan LongestDecode = TimeSpan.FromSeconds(10);

    private static readonly byte[][] Tokens =
    [
        .. new[]
        {
            "\"", "\\", "\\ud800", "{", "}", "[", "]", ",", ":", "null", "true", "1e999", "-", "0", "9999999999999999999999", "\"bt\":", "\"v\":", "\"n\":\"power\"", "\"u\":\"kW\"",
            "\0", "\uFEFF", "\"a_\":1", "e", ".", "\"bver\":11", "1e-9999999", "\u2028", "~1", "/0",
        }.Select(Encoding.UTF8.GetBytes),
        [0xFF], [0xC0, 0x80], [0xED, 0xA0, 0x80], [0x9F], [0xBF], [0x7F], [0x5F], [0xC4, 0x82], [0xFB], [0xF9, 0x7C, 0x00], [0x1B, 0xFF, 0xFF, 0xFF, 0xFF, 0xFF, 0xFF, 0xFF, 0xFF],
    ];

    [Fact]
    public void Ten_million_mutated_payloads_neither_break_nor_fill_anything()
    {
        int count = TestLength.Of(shortForm: 200_000, longForm: 10_000_000);
        byte[][] corpus = [.. Directory.GetFiles(Path.Combine(AppContext.BaseDirectory, "Intake", "Corpus")).Order(StringComparer.Ordinal).Select(File.ReadAllBytes)];
        Assert.True(corpus.Length >= 20, "The corpus is missing.");
        PayloadDecoder decoder = Decoder();
        foreach (byte[] payload in corpus)
        {
            Decode(decoder, payload, 0);
            Decode(decoder, payload, 1);
            Decode(decoder, payload, 2);
        }

        long settled = GC.GetTotalMemory(forceFullCollection: true);
        int threads = Math.Max(1, Environment.ProcessorCount);
        long readings = 0;
        long refused = 0;
        Parallel.For(0, threads, thread =>
        {
            var random = new Random(Seed + thread);
            byte[] former = corpus[0];
            for (int i = thread; i < count; i += threads)
            {
                // Every other one goes on from the last, so that mutations pile up.
                byte[] payload = Mutate(random.Next(2) == 0 && former.Length is > 0 and < LongestPayload ? former : corpus[random.Next(corpus.Length)], random);
                DecodedMessage decoded = Decode(decoder, payload, random.Next(3));
                Interlocked.Add(ref readings, decoded.Pack?.Readings.Count ?? 0);
                Interlocked.Add(ref refused, decoded.Findings.Count > 0 ? 1 : 0);
                former = payload;
            }
        });
        long left = GC.GetTotalMemory(forceFullCollection: true) - settled;
        ReliabilityReport.Record(
            "payload decoders",
            "mutated payloads (SenML JSON, SenML CBOR, bare numbers, mapped JSON)",
            $"{count:N0} from a corpus of {corpus.Length}",
            $"no exception, no hang; {refused:N0} refused in whole or in part, {readings:N0} readings; {left / 1024:N0} KiB more in use afterwards");
        Assert.InRange(left, long.MinValue, 16L << 20);
        Assert.InRange(readings, 1, long.MaxValue);
        Assert.InRange(refused, 1, count);
    }

    private static PayloadDecoder Decoder() => new(
        new FixedLab(),
        "lab",
        new PayloadLimits(),
        new ReadingTimeRule(),
        new MappingTable([new MappingOptions
        {
            Topic = "gateways/{source}",
            Time = "/at",
            TimeFormat = MappedTime.UnixMilliseconds,
            Values = [new() { At = "/sensors/0/w", Channel = "power" }],
        }]));

    private static DecodedMessage Decode(PayloadDecoder decoder, byte[] payload, int way)
    {
        string topic = way switch
        {
            0 => IntakeHost.Topic,
            1 => IntakeHost.Topic + "/power",
            _ => "gateways/fir",
        };
        long before = GC.GetAllocatedBytesForCurrentThread();
        long begun = TimeProvider.System.GetTimestamp();
        DecodedMessage decoded = decoder.Decode(topic, new ReadOnlySequence<byte>(payload), false, Arrival);
        Assert.True(TimeProvider.System.GetElapsedTime(begun) < LongestDecode, Convert.ToHexString(payload));
        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 128_000 + (128L * payload.Length), Convert.ToHexString(payload));
        Assert.True(decoded.Findings.Count <= FindingList.Limit + 1);
        foreach (Reading reading in decoded.Pack?.Readings ?? [])
        {
            Assert.Equal(double.IsNaN(reading.Value), (reading.Quality & ReadingQuality.NoValue) != 0);
            Assert.False(double.IsInfinity(reading.Value), Convert.ToHexString(payload));
        }

        return decoded;
    }

    private static byte[] Mutate(byte[] payload, Random random)
    {
        var bytes = new List<byte>(payload);
        for (int edits = random.Next(1, 5); edits > 0; edits--)
        {
            int at = random.Next(bytes.Count + 1);
            switch (random.Next(6))
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
                case 4 when bytes.Count > 0:
                    bytes[Math.Min(at, bytes.Count - 1)] = (byte)random.Next(256);
                    break;
                default:
                    bytes.RemoveRange(at, bytes.Count - at);
                    break;
            }
        }

        return [.. bytes];
    }
}
