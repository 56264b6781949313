using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Lab.Time;
using LabWatch.Records.Audit.Covered;

namespace LabWatch.Records.Audit.Verification;

/// <summary>Tells which column of an altered row differs, for those that the content of the entry repeats.</summary>
internal static class ContentFields
{
    /// <summary>The first column whose value differs from the member of that name in the entry; null where none is told apart.</summary>
    public static string? Differing(RecordsSnapshot records, string site, long sequence, ImmutableArray<CoveredColumn> columns, TableScan row)
    {
        if (Content(records, site, sequence) is not { } content)
        {
            return null;
        }

        for (int i = 0; i < columns.Length; i++)
        {
            if (content.TryGetPropertyValue(MemberName(columns[i].Name), out JsonNode? told) && !IsEqual(told, row, i))
            {
                return columns[i].Name;
            }
        }

        return null;
    }

    private static JsonObject? Content(RecordsSnapshot records, string site, long sequence)
    {
        try
        {
            using TableScan scan = records.Scan(
                $"SELECT content FROM audit_entries WHERE site = '{site.Replace("'", "''", StringComparison.Ordinal)}' AND sequence = {sequence.ToString(CultureInfo.InvariantCulture)}");
            return scan.Read() && scan.Kind(0) is CellKind.Text ? JsonNode.Parse(scan.Bytes(0)) as JsonObject : null;
        }
        catch (Exception exception) when (exception is UnreadableException or JsonException)
        {
            return null;
        }
    }

    private static bool IsEqual(JsonNode? told, TableScan row, int column) => (told?.GetValueKind(), row.Kind(column)) switch
    {
        (null or JsonValueKind.Null, CellKind.Null) => true,
        (JsonValueKind.String, CellKind.Text) => told!.GetValue<string>() == Encoding.UTF8.GetString(row.Bytes(column)),
        (JsonValueKind.String, CellKind.Whole) => Instant.TryParse(told!.GetValue<string>(), out Instant time) && time.Microseconds == row.Whole(column),
        (JsonValueKind.Number, CellKind.Whole) => told!.GetValue<double>() == row.Whole(column),
        (JsonValueKind.Number, CellKind.Real) => told!.GetValue<double>() == row.Real(column),
        _ => false,
    };

    private static string MemberName(string column) =>
        string.Concat(column.Split('_').Select((word, index) => index == 0 ? word : char.ToUpperInvariant(word[0]) + word[1..]));
}
