using System.Buffers;
using System.Buffers.Binary;
using System.IO.Hashing;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Intake.Spool;

/// <summary>
/// The bytes of spool records, little-endian: marker, length of the body, CRC-32 of length and body, body. The layout is in the
/// reference page of the intake; a change of it needs another file header.
/// </summary>
internal static class SpoolCodec
{
    /// <summary>What every spool file starts with.</summary>
    public static ReadOnlySpan<byte> FileHeader => "LWSPOOL1"u8;

    /// <summary>What every record starts with, so that reading can go on after damage.</summary>
    public static ReadOnlySpan<byte> Marker => [0xA5, 0x4C, 0x57, 0x52];

    /// <summary>Bytes before the body: marker, length, CRC.</summary>
    public const int RecordHeaderLength = 12;

    /// <summary>Longest body, bytes.</summary>
    public const int LongestBody = 64 << 20;

    private const byte PackKind = 1;
    private const byte RefusedKind = 2;

    public static void Write(ArrayBufferWriter<byte> target, in SpoolEntry entry)
    {
        if (entry.Pack is { } pack)
        {
            var body = new SpoolBodyWriter();
            body.Byte(PackKind);
            WritePack(body, pack);
            Frame(target, body.Written);
        }

        if (entry.Refused is { } refused)
        {
            var body = new SpoolBodyWriter();
            body.Byte(RefusedKind);
            WriteRefused(body, refused);
            Frame(target, body.Written);
        }
    }

    /// <summary>Reads the record at the start of a span; false where there is no intact one.</summary>
    public static bool TryRead(ReadOnlySpan<byte> from, out SpoolEntry entry, out int length)
    {
        entry = default;
        length = 0;
        if (from.Length < RecordHeaderLength || !from.StartsWith(Marker))
        {
            return false;
        }

        int bodyLength = BinaryPrimitives.ReadInt32LittleEndian(from[4..]);
        if (bodyLength is < 1 or > LongestBody || from.Length - RecordHeaderLength < bodyLength)
        {
            return false;
        }

        ReadOnlySpan<byte> body = from.Slice(RecordHeaderLength, bodyLength);
        length = RecordHeaderLength + bodyLength;
        return BinaryPrimitives.ReadUInt32LittleEndian(from[8..]) == Checksum(from[4..8], body) && TryReadBody(body, out entry);
    }

    private static void Frame(ArrayBufferWriter<byte> target, ReadOnlySpan<byte> body)
    {
        Span<byte> header = target.GetSpan(RecordHeaderLength);
        Marker.CopyTo(header);
        BinaryPrimitives.WriteInt32LittleEndian(header[4..], body.Length);
        BinaryPrimitives.WriteUInt32LittleEndian(header[8..], Checksum(header[4..8], body));
        target.Advance(RecordHeaderLength);
        target.Write(body);
    }

    private static uint Checksum(ReadOnlySpan<byte> length, ReadOnlySpan<byte> body)
    {
        var crc = new Crc32();
        crc.Append(length);
        crc.Append(body);
        return crc.GetCurrentHashAsUInt32();
    }

    private static bool TryReadBody(ReadOnlySpan<byte> bytes, out SpoolEntry entry)
    {
        var body = new SpoolBodyReader(bytes);
        entry = body.Byte() switch
        {
            PackKind => new SpoolEntry(ReadPack(ref body), null),
            RefusedKind => new SpoolEntry(null, ReadRefused(ref body)),
            _ => default,
        };
        return !body.Failed && (entry.Pack is not null || entry.Refused is not null);
    }

    private static void WritePack(SpoolBodyWriter body, ReadingPack pack)
    {
        string[] channels = [.. pack.Readings.Select(reading => reading.Channel).Distinct(StringComparer.Ordinal)];
        var index = new Dictionary<string, int>(channels.Length, StringComparer.Ordinal);
        body.Text(pack.Source.Site);
        body.Text(pack.Source.Source);
        body.Int64(pack.Arrival.Microseconds);
        body.Int32(channels.Length);
        foreach (string channel in channels)
        {
            index.Add(channel, index.Count);
            body.Text(channel);
        }

        body.Int32(pack.Readings.Count);
        foreach (Reading reading in pack.Readings)
        {
            body.Int32(index[reading.Channel]);
            body.Int64(reading.Time.Microseconds);
            body.Int64(BitConverter.DoubleToInt64Bits(reading.Value));
            body.Byte((byte)reading.Quality);
        }
    }

    private static ReadingPack ReadPack(ref SpoolBodyReader body)
    {
        var source = new SourceKey(body.Text(), body.Text());
        var arrival = new Instant(body.Int64());
        string[] channels = new string[body.Count(SpoolBodyReader.ShortestText)];
        for (int i = 0; i < channels.Length; i++)
        {
            channels[i] = body.Text();
        }

        var readings = new Reading[body.Count(SpoolBodyReader.ReadingLength)];
        for (int i = 0; i < readings.Length; i++)
        {
            string channel = body.Pick(channels);
            readings[i] = new Reading(
                channel, new Instant(body.Int64()), BitConverter.Int64BitsToDouble(body.Int64()), (ReadingQuality)body.Byte());
        }

        return new ReadingPack(source, arrival, readings);
    }

    private static void WriteRefused(SpoolBodyWriter body, QuarantinedMessage refused)
    {
        body.Int64(refused.Arrival.Microseconds);
        body.Text(refused.Topic);
        body.Bytes(refused.Payload.Span);
        body.Int32(refused.Findings.Count);
        foreach (Finding finding in refused.Findings)
        {
            body.Text(finding.Code);
            body.Text(finding.Where);
            body.Text(finding.Message);
            body.Byte(finding.Value is null ? (byte)0 : (byte)1);
            body.Text(finding.Value ?? string.Empty);
            body.Text(finding.Cure);
        }
    }

    private static QuarantinedMessage ReadRefused(ref SpoolBodyReader body)
    {
        var arrival = new Instant(body.Int64());
        string topic = body.Text();
        byte[] payload = body.Bytes().ToArray();
        var findings = new Finding[body.Count(SpoolBodyReader.ShortestFinding)];
        for (int i = 0; i < findings.Length; i++)
        {
            string code = body.Text();
            string where = body.Text();
            string message = body.Text();
            bool hasValue = body.Byte() == 1;
            string value = body.Text();
            findings[i] = new Finding(code, where, message, hasValue ? value : null, body.Text());
        }

        return new QuarantinedMessage(arrival, topic, payload, findings);
    }
}
