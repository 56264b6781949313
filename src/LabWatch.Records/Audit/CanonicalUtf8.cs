using System.Buffers;
using System.Buffers.Text;
using System.Globalization;
using System.Text;

namespace LabWatch.Records.Audit;

/// <summary>The values of RFC 8785 as UTF-8, for text that is UTF-8 already. Bytes that are no UTF-8 go through unchanged.</summary>
internal static class CanonicalUtf8
{
    /// <summary>Largest whole number that every reader of JSON keeps (RFC 7493, 2.2); greater ones are written as texts.</summary>
    private const long LargestWhole = (1L << 53) - 1;

    private static readonly SearchValues<byte> Escaped = SearchValues.Create([.. Enumerable.Range(0, 0x20).Select(code => (byte)code), (byte)'"', (byte)'\\']);

    /// <summary>A text in quotation marks, with the fewest escapes.</summary>
    public static void WriteText(IBufferWriter<byte> output, ReadOnlySpan<byte> text)
    {
        output.Write("\""u8);
        for (int next; (next = text.IndexOfAny(Escaped)) >= 0; text = text[(next + 1)..])
        {
            output.Write(text[..next]);
            WriteEscape(output, text[next]);
        }

        output.Write(text);
        output.Write("\""u8);
    }

    /// <summary>A text in quotation marks. Throws <see cref="ArgumentException"/> where it holds half of a surrogate pair.</summary>
    public static void WriteText(IBufferWriter<byte> output, string text)
    {
        byte[] buffer = ArrayPool<byte>.Shared.Rent(Encoding.UTF8.GetMaxByteCount(text.Length));
        try
        {
            OperationStatus status = System.Text.Unicode.Utf8.FromUtf16(text, buffer, out _, out int written, replaceInvalidSequences: false);
            if (status is not OperationStatus.Done)
            {
                throw new ArgumentException("A text holds half of a surrogate pair, which has no canonical form.", nameof(text));
            }

            WriteText(output, buffer.AsSpan(0, written));
        }
        finally
        {
            ArrayPool<byte>.Shared.Return(buffer);
        }
    }

    /// <summary>A whole number: digits, or a text where a double could not hold it.</summary>
    public static void WriteWhole(IBufferWriter<byte> output, long number)
    {
        bool isNumber = number is >= -LargestWhole and <= LargestWhole;
        if (!isNumber)
        {
            output.Write("\""u8);
        }

        Utf8Formatter.TryFormat(number, output.GetSpan(20), out int written);
        output.Advance(written);
        if (!isNumber)
        {
            output.Write("\""u8);
        }
    }

    /// <summary>A number; one that is not finite as the text <c>NaN</c>, <c>Infinity</c> or <c>-Infinity</c>.</summary>
    public static void WriteReal(IBufferWriter<byte> output, double number)
    {
        if (double.IsFinite(number))
        {
            output.Write(Encoding.ASCII.GetBytes(CanonicalNumber.Write(number)));
        }
        else
        {
            WriteText(output, number.ToString(CultureInfo.InvariantCulture));
        }
    }

    /// <summary>Bytes as a text of small hexadecimal digits.</summary>
    public static void WriteHex(IBufferWriter<byte> output, ReadOnlySpan<byte> bytes)
    {
        Span<byte> target = output.GetSpan((bytes.Length * 2) + 2);
        target[0] = (byte)'"';
        Convert.TryToHexStringLower(bytes, target[1..], out int written);
        target[written + 1] = (byte)'"';
        output.Advance(written + 2);
    }

    private static void WriteEscape(IBufferWriter<byte> output, byte code)
    {
        ReadOnlySpan<byte> escaped = code switch
        {
            (byte)'"' => "\\\""u8,
            (byte)'\\' => "\\\\"u8,
            (byte)'\b' => "\\b"u8,
            (byte)'\t' => "\\t"u8,
            (byte)'\n' => "\\n"u8,
            (byte)'\f' => "\\f"u8,
            (byte)'\r' => "\\r"u8,
            _ => Encoding.ASCII.GetBytes(FormattableString.Invariant($"\\u{code:x4}")),
        };
        output.Write(escaped);
    }
}
