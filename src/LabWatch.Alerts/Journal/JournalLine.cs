using System.Buffers;
using System.Globalization;
using System.Numerics;
using System.Runtime.InteropServices;
using System.Text;
using System.Text.Json;

namespace LabWatch.Alerts.Journal;

/// <summary>
/// One line of the journal: the CRC-32C (RFC 3720, appendix B.4) of the JSON as eight hexadecimal digits, a space, the JSON in UTF-8, a line feed.
/// JSON as written here never holds a line feed, so a damaged line costs only itself.
/// </summary>
internal static class JournalLine
{
    private const int PrefixLength = 9;

    /// <summary>First line of every journal file.</summary>
    public static ReadOnlySpan<byte> Header => "labwatch alert journal 1\n"u8;

    /// <summary>Appends an entry's line to a buffer.</summary>
    public static void Write(JournalEntry entry, IBufferWriter<byte> target)
    {
        byte[] json = JsonSerializer.SerializeToUtf8Bytes(entry, JournalJson.Default.JournalEntry);
        target.Write(Encoding.ASCII.GetBytes(Crc32C(json).ToString("x8", CultureInfo.InvariantCulture)));
        target.Write(" "u8);
        target.Write(json);
        target.Write("\n"u8);
    }

    /// <summary>Reads a line without its line feed; null where it is damaged.</summary>
    public static JournalEntry? Read(ReadOnlySpan<byte> line)
    {
        if (line.Length <= PrefixLength || line[PrefixLength - 1] != (byte)' '
            || !uint.TryParse(line[..(PrefixLength - 1)], NumberStyles.AllowHexSpecifier, CultureInfo.InvariantCulture, out uint crc)
            || crc != Crc32C(line[PrefixLength..]))
        {
            return null;
        }

        try
        {
            return JsonSerializer.Deserialize(line[PrefixLength..], JournalJson.Default.JournalEntry);
        }
        catch (JsonException)
        {
            return null;
        }
    }

    /// <summary>CRC-32C (Castagnoli polynomial 0x1EDC6F41, reflected, start and end inverted).</summary>
    public static uint Crc32C(ReadOnlySpan<byte> bytes)
    {
        uint crc = uint.MaxValue;
        ReadOnlySpan<ulong> words = MemoryMarshal.Cast<byte, ulong>(bytes);
        foreach (ulong word in words)
        {
            crc = BitOperations.Crc32C(crc, BitConverter.IsLittleEndian ? word : System.Buffers.Binary.BinaryPrimitives.ReverseEndianness(word));
        }

        foreach (byte value in bytes[(words.Length * sizeof(ulong))..])
        {
            crc = BitOperations.Crc32C(crc, value);
        }

        return ~crc;
    }
}
