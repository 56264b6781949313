using System.Buffers.Binary;
using System.Buffers.Text;

namespace LabWatch.Records;

/// <summary>
/// Where a page ended: the time and the number of its last row. Written as 22 characters that mean nothing to a client; a cursor stays
/// usable while rows are added.
/// </summary>
/// <param name="Time">Sorting time of the last row, microseconds since 1970 UTC.</param>
/// <param name="Number">Number of the last row among rows of the same time.</param>
public readonly record struct PageCursor(long Time, long Number)
{
    private const int Length = 16;

    /// <summary>Reads a cursor; false where the text is none.</summary>
    public static bool TryParse(string? text, out PageCursor cursor)
    {
        Span<byte> bytes = stackalloc byte[Length];
        bool ok = text is { Length: 22 } && Base64Url.IsValid(text) && Base64Url.TryDecodeFromChars(text, bytes, out int written) && written == Length;
        cursor = ok ? new(BinaryPrimitives.ReadInt64BigEndian(bytes), BinaryPrimitives.ReadInt64BigEndian(bytes[8..])) : default;
        return ok;
    }

    /// <summary>The cursor as text.</summary>
    public override string ToString()
    {
        Span<byte> bytes = stackalloc byte[Length];
        BinaryPrimitives.WriteInt64BigEndian(bytes, Time);
        BinaryPrimitives.WriteInt64BigEndian(bytes[8..], Number);
        return Base64Url.EncodeToString(bytes);
    }

    /// <summary>The cursor of a query; null for the first page. Throws <see cref="ArgumentException"/> where the text is no cursor.</summary>
    internal static PageCursor? Of(string? text) =>
        text is null ? null
        : TryParse(text, out PageCursor cursor) ? cursor
        : throw new ArgumentException("The text is no page cursor.", nameof(text));
}
