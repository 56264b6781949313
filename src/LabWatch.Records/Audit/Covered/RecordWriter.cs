using System.Buffers;
using System.Text;

namespace LabWatch.Records.Audit.Covered;

/// <summary>Writes the canonical form of a row: an object of its columns, which must come in the order of their names.</summary>
internal ref struct RecordWriter(ArrayBufferWriter<byte> output)
{
    private bool _isBegun;

    /// <summary>A text.</summary>
    public void Text(string column, string text)
    {
        Name(column);
        CanonicalUtf8.WriteText(output, text);
    }

    /// <summary>A text in UTF-8.</summary>
    public void Text(string column, scoped ReadOnlySpan<byte> text)
    {
        Name(column);
        CanonicalUtf8.WriteText(output, text);
    }

    /// <summary>A whole number.</summary>
    public void Whole(string column, long number)
    {
        Name(column);
        CanonicalUtf8.WriteWhole(output, number);
    }

    /// <summary>A double.</summary>
    public void Real(string column, double number)
    {
        Name(column);
        CanonicalUtf8.WriteReal(output, number);
    }

    /// <summary>True or false.</summary>
    public void Truth(string column, bool truth)
    {
        Name(column);
        output.Write(truth ? "true"u8 : "false"u8);
    }

    /// <summary>Bytes.</summary>
    public void Bytes(string column, scoped ReadOnlySpan<byte> bytes)
    {
        Name(column);
        CanonicalUtf8.WriteHex(output, bytes);
    }

    /// <summary>Ends the object.</summary>
    public readonly void End() => output.Write(_isBegun ? "}"u8 : "{}"u8);

    private void Name(string column)
    {
        output.Write(_isBegun ? ",\""u8 : "{\""u8);
        _isBegun = true;
        output.Advance(Encoding.ASCII.GetBytes(column, output.GetSpan(column.Length)));
        output.Write("\":"u8);
    }
}
