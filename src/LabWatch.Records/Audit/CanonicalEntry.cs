using System.Buffers;
using System.Globalization;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Audit;

/// <summary>The parts of an entry that its digest covers, texts as UTF-8.</summary>
internal readonly ref struct CanonicalEntry
{
    public required ReadOnlySpan<byte> Site { get; init; }

    public required long Sequence { get; init; }

    /// <summary>Microseconds since 1970-01-01T00:00:00Z.</summary>
    public required long At { get; init; }

    public required ReadOnlySpan<byte> Actor { get; init; }

    public required ReadOnlySpan<byte> Action { get; init; }

    public required ReadOnlySpan<byte> Subject { get; init; }

    /// <summary>A JSON object that is in canonical form already.</summary>
    public required ReadOnlySpan<byte> Content { get; init; }

    /// <summary>Digest of the covered record; empty where there is none.</summary>
    public required ReadOnlySpan<byte> RecordDigest { get; init; }

    public required ReadOnlySpan<byte> Previous { get; init; }

    /// <summary>Writes the canonical form (RFC 8785): the members in order of their names.</summary>
    public void Write(IBufferWriter<byte> output)
    {
        output.Write("{\"action\":"u8);
        CanonicalUtf8.WriteText(output, Action);
        output.Write(",\"actor\":"u8);
        CanonicalUtf8.WriteText(output, Actor);
        output.Write(",\"at\":"u8);
        WriteTime(output, At);
        output.Write(",\"content\":"u8);
        output.Write(Content);
        output.Write(",\"previous\":"u8);
        CanonicalUtf8.WriteHex(output, Previous);
        output.Write(",\"recordDigest\":"u8);
        if (RecordDigest.IsEmpty)
        {
            output.Write("null"u8);
        }
        else
        {
            CanonicalUtf8.WriteHex(output, RecordDigest);
        }

        output.Write(",\"sequence\":"u8);
        CanonicalUtf8.WriteWhole(output, Sequence);
        output.Write(",\"site\":"u8);
        CanonicalUtf8.WriteText(output, Site);
        output.Write(",\"subject\":"u8);
        CanonicalUtf8.WriteText(output, Subject);
        output.Write("}"u8);
    }

    /// <summary>A time as RFC 3339 in UTC with the shortest fraction that is exact; one outside the years 1 to 9999 as its number of microseconds.</summary>
    private static void WriteTime(IBufferWriter<byte> output, long microseconds)
    {
        if (microseconds < Instant.MinValue.Microseconds || microseconds > Instant.MaxValue.Microseconds)
        {
            CanonicalUtf8.WriteWhole(output, microseconds);
            return;
        }

        output.Write("\""u8);
        new Instant(microseconds).ToDateTimeOffset().TryFormat(output.GetSpan(32), out int written, "yyyy-MM-dd'T'HH:mm:ss.FFFFFF", CultureInfo.InvariantCulture);
        output.Advance(written);
        output.Write("Z\""u8);
    }
}
