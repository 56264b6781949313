using System.Buffers;
using LabWatch.Records.Audit.Covered;

namespace LabWatch.Records.Audit.Verification;

/// <summary>
/// Writes the canonical form of a row as it was read, as <see cref="CoveredRow"/> writes that of a row of the model. A value of a kind that
/// its column cannot have is written so that no row of the model has the same form.
/// </summary>
internal static class CellWriter
{
    private const int UuidLength = 36;

    /// <summary>Writes one column.</summary>
    public static void Write(ref RecordWriter record, CoveredColumn column, TableScan scan, int place)
    {
        CellKind kind = scan.Kind(place);
        switch (column.Form, kind)
        {
            case (_, CellKind.Null):
                break;
            case (CoveredForm.Text, CellKind.Text):
                record.Text(column.Name, scan.Bytes(place));
                break;
            case (CoveredForm.Whole, CellKind.Whole):
                record.Whole(column.Name, scan.Whole(place));
                break;
            case (CoveredForm.Real, CellKind.Real):
                record.Real(column.Name, scan.Real(place));
                break;
            case (CoveredForm.Truth, CellKind.Whole or CellKind.Truth) when scan.Whole(place) is 0 or 1:
                record.Truth(column.Name, scan.Whole(place) == 1);
                break;
            case (CoveredForm.Uuid, CellKind.Uuid):
                record.Text(column.Name, scan.Bytes(place));
                break;
            case (CoveredForm.Uuid, CellKind.Text) when IsUuid(scan.Bytes(place)):
                record.Text(column.Name, ToSmall(scan.Bytes(place), stackalloc byte[UuidLength]));
                break;
            case (CoveredForm.Bytes, CellKind.Bytes):
                record.Bytes(column.Name, scan.Bytes(place));
                break;
            default:
                record.Bytes(column.Name + "!" + kind, kind is CellKind.Text or CellKind.Bytes ? scan.Bytes(place) : []);
                break;
        }
    }

    /// <summary>Writes the part of a subject that stands for a column.</summary>
    public static void WriteSubject(IBufferWriter<byte> subject, CoveredColumn column, TableScan scan, int place)
    {
        switch (scan.Kind(place))
        {
            case CellKind.Whole:
                System.Buffers.Text.Utf8Formatter.TryFormat(scan.Whole(place), subject.GetSpan(20), out int written);
                subject.Advance(written);
                break;
            case CellKind.Text when column.Form is CoveredForm.Uuid && IsUuid(scan.Bytes(place)):
                subject.Write(ToSmall(scan.Bytes(place), stackalloc byte[UuidLength]));
                break;
            case CellKind.Text or CellKind.Uuid:
                subject.Write(scan.Bytes(place));
                break;
            default:
                subject.Write("(no value)"u8);
                break;
        }
    }

    /// <summary>Whether a text is a UUID exactly as the SQLite provider writes it: capital letters.</summary>
    private static bool IsUuid(ReadOnlySpan<byte> text)
    {
        if (text.Length != UuidLength)
        {
            return false;
        }

        for (int i = 0; i < text.Length; i++)
        {
            bool isDash = i is 8 or 13 or 18 or 23;
            if (isDash ? text[i] != (byte)'-' : !char.IsAsciiHexDigitUpper((char)text[i]))
            {
                return false;
            }
        }

        return true;
    }

    private static Span<byte> ToSmall(ReadOnlySpan<byte> text, Span<byte> target)
    {
        System.Text.Ascii.ToLower(text, target, out _);
        return target;
    }
}
