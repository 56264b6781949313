using System.Buffers;
using System.Buffers.Text;
using System.Formats.Cbor;
using System.Globalization;
using System.Numerics;
using System.Text;
using System.Text.Json;

namespace LabWatch.Intake.Payloads;

/// <summary>
/// Writes a SenML pack in CBOR (RFC 8428 section 6; RFC 8949) as the SenML JSON of the same content, so that both formats mean the same by
/// passing one decoder. Numbers keep their value: a binary number becomes the shortest decimal text that reads back to it, a decimal
/// fraction (tag 4) its own digits.
/// </summary>
internal static class SenmlCborTranscoder
{
    private const int LongestInteger = 40;

    /// <summary>Whether bytes begin as a CBOR array or map, or with the tag that says so; no JSON, number or other UTF-8 text does.</summary>
    public static bool IsCbor(ReadOnlySpan<byte> bytes) => !bytes.IsEmpty && (bytes[0] is >= 0x80 and <= 0xBF || bytes.StartsWith(SelfDescribed));

    private static ReadOnlySpan<byte> SelfDescribed => [0xD9, 0xD9, 0xF7];

    /// <summary>
    /// Writes the JSON. False where the bytes are malformed, nested too deeply, or hold more than one item; <paramref name="at"/> is then how
    /// far the reader came.
    /// </summary>
    public static bool TryWrite(ReadOnlyMemory<byte> cbor, int maximumDepth, ArrayBufferWriter<byte> json, out int at)
    {
        CborReader reader = new(cbor, CborConformanceMode.Lax);
        try
        {
            using Utf8JsonWriter writer = new(json, new JsonWriterOptions { SkipValidation = true, MaxDepth = maximumDepth });
            WriteItem(reader, writer, maximumDepth);
            writer.Flush();
            at = cbor.Length - reader.BytesRemaining;
            return reader.BytesRemaining == 0;
        }
        catch (Exception exception) when (exception is CborContentException or InvalidOperationException or OverflowException or ArgumentException)
        {
            at = cbor.Length - reader.BytesRemaining;
            return false;
        }
    }

    private static void WriteItem(CborReader reader, Utf8JsonWriter writer, int depth)
    {
        switch (reader.PeekState())
        {
            case CborReaderState.UnsignedInteger:
                writer.WriteNumberValue(reader.ReadUInt64());
                break;
            case CborReaderState.NegativeInteger:
                WriteRaw(writer, -1 - (Int128)reader.ReadCborNegativeIntegerRepresentation());
                break;
            case CborReaderState.TextString or CborReaderState.StartIndefiniteLengthTextString:
                writer.WriteStringValue(reader.ReadTextString());
                break;
            case CborReaderState.ByteString or CborReaderState.StartIndefiniteLengthByteString:
                writer.WriteStringValue(Base64Url.EncodeToString(reader.ReadByteString()));
                break;
            case CborReaderState.StartArray:
                WriteArray(reader, writer, Inside(depth));
                break;
            case CborReaderState.StartMap:
                WriteMap(reader, writer, Inside(depth));
                break;
            case CborReaderState.Tag:
                WriteTagged(reader, writer, Inside(depth));
                break;
            case CborReaderState.Boolean:
                writer.WriteBooleanValue(reader.ReadBoolean());
                break;
            case CborReaderState.HalfPrecisionFloat or CborReaderState.SinglePrecisionFloat or CborReaderState.DoublePrecisionFloat:
                WriteDouble(writer, reader.ReadDouble());
                break;
            default:
                // Null, undefined and other simple values: nothing that is a number.
                reader.SkipValue();
                writer.WriteNullValue();
                break;
        }
    }

    private static void WriteArray(CborReader reader, Utf8JsonWriter writer, int depth)
    {
        reader.ReadStartArray();
        writer.WriteStartArray();
        while (reader.PeekState() != CborReaderState.EndArray)
        {
            WriteItem(reader, writer, depth);
        }

        reader.ReadEndArray();
        writer.WriteEndArray();
    }

    private static void WriteMap(CborReader reader, Utf8JsonWriter writer, int depth)
    {
        reader.ReadStartMap();
        writer.WriteStartObject();
        while (reader.PeekState() != CborReaderState.EndMap)
        {
            writer.WritePropertyName(Label(reader));
            WriteItem(reader, writer, depth);
        }

        reader.ReadEndMap();
        writer.WriteEndObject();
    }

    /// <summary>The label of a key (RFC 8428 table 6); a number that the table does not have stays a number, which no decoder knows.</summary>
    private static string Label(CborReader reader) => reader.PeekState() is CborReaderState.UnsignedInteger or CborReaderState.NegativeInteger
        ? reader.ReadInt64() switch
        {
            -6 => "bs",
            -5 => "bv",
            -4 => "bu",
            -3 => "bt",
            -2 => "bn",
            -1 => "bver",
            0 => "n",
            1 => "u",
            2 => "v",
            3 => "vs",
            4 => "vb",
            5 => "s",
            6 => "t",
            7 => "ut",
            8 => "vd",
            long other => other.ToString(CultureInfo.InvariantCulture),
        }
        : reader.ReadTextString();

    private static void WriteTagged(CborReader reader, Utf8JsonWriter writer, int depth)
    {
        switch (reader.PeekTag())
        {
            case CborTag.DecimalFraction:
                reader.ReadTag();
                reader.ReadStartArray();
                long exponent = reader.ReadInt64();
                Int128 mantissa = reader.PeekState() == CborReaderState.NegativeInteger
                    ? -1 - (Int128)reader.ReadCborNegativeIntegerRepresentation()
                    : reader.ReadUInt64();
                reader.ReadEndArray();
                writer.WriteRawValue(string.Create(CultureInfo.InvariantCulture, $"{mantissa}e{exponent}"), skipInputValidation: true);
                break;
            case CborTag.UnsignedBigNum or CborTag.NegativeBigNum:
                BigInteger number = reader.ReadBigInteger();
                string text = number.GetBitLength() < 4 * LongestInteger ? number.ToString(CultureInfo.InvariantCulture) : "1e999";
                writer.WriteRawValue(text, skipInputValidation: true);
                break;
            default:
                reader.ReadTag();
                WriteItem(reader, writer, depth);
                break;
        }
    }

    /// <summary>NaN is a reading without a value; infinity becomes a number that the decoder refuses as too large.</summary>
    private static void WriteDouble(Utf8JsonWriter writer, double value)
    {
        if (double.IsNaN(value))
        {
            writer.WriteNullValue();
        }
        else if (double.IsInfinity(value))
        {
            writer.WriteRawValue(value > 0 ? "1e999"u8 : "-1e999"u8, skipInputValidation: true);
        }
        else
        {
            writer.WriteNumberValue(value);
        }
    }

    private static void WriteRaw(Utf8JsonWriter writer, Int128 value) =>
        writer.WriteRawValue(Encoding.ASCII.GetBytes(value.ToString(CultureInfo.InvariantCulture)), skipInputValidation: true);

    private static int Inside(int depth) => depth > 0 ? depth - 1 : throw new CborContentException("The nesting is deeper than permitted.");
}
