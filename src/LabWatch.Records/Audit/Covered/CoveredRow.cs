using System.Buffers;
using System.Collections.Immutable;
using System.Globalization;
using System.Security.Cryptography;
using LabWatch.Records.Storage;

namespace LabWatch.Records.Audit.Covered;

/// <summary>Site, subject and record digest of a row of the model.</summary>
internal static class CoveredRow
{
    /// <summary>Site, subject and record digest (hexadecimal) of a row. Throws <see cref="ArgumentException"/> where its table is not covered.</summary>
    public static (string Site, string Subject, string Digest) Describe(RecordsContext context, object row)
    {
        CoveredTable table = CoveredTables.Of(row.GetType());
        ImmutableArray<CoveredColumn> columns = CoveredColumns.Of(context, table);
        ArrayBufferWriter<byte> output = new(1024);
        RecordWriter record = new(output);
        foreach (CoveredColumn column in columns)
        {
            Write(ref record, column, column.Read(row));
        }

        record.End();
        return ((string)columns.First(column => column.Name == "site").Read(row)!, SubjectOf(table, columns, row), Convert.ToHexStringLower(SHA256.HashData(output.WrittenSpan)));
    }

    private static string SubjectOf(CoveredTable table, ImmutableArray<CoveredColumn> columns, object row) =>
        string.Concat(table.Parts.Select(part => part.IsColumn
            ? Convert.ToString(columns.First(column => column.Name == part.Text).Read(row), CultureInfo.InvariantCulture)
            : part.Text));

    private static void Write(ref RecordWriter record, CoveredColumn column, object? value)
    {
        switch (value)
        {
            case null:
                break;
            case string text:
                record.Text(column.Name, text);
                break;
            case double number:
                record.Real(column.Name, number);
                break;
            case bool truth:
                record.Truth(column.Name, truth);
                break;
            case Guid id:
                record.Text(column.Name, id.ToString("D"));
                break;
            case byte[] bytes:
                record.Bytes(column.Name, bytes);
                break;
            default:
                record.Whole(column.Name, Convert.ToInt64(value, CultureInfo.InvariantCulture));
                break;
        }
    }
}
