using System.Text;

namespace LabWatch.Records.Audit.Verification;

/// <summary>
/// What people see first is derived: an alert as it is now from its last step, the head of a series of assessments from its newest one.
/// Both must follow from the covered rows.
/// </summary>
internal sealed class DerivedCheck(RecordsSnapshot records, TrailFindings findings)
{
    private const string Rebuild = "The row was altered, or a row that it follows from was removed or added.";

    private static readonly string[] AlertColumns =
    [
        "site", "priority", "state", "headline", "detail", "value", "limit_value", "unit", "returned_at", "acknowledged_at", "acknowledged_by", "acknowledge_note",
    ];

    /// <summary>Checks both tables.</summary>
    public void Run()
    {
        Compare("alerts", ["id"], ["transition", .. AlertColumns], "alert_transitions", ["alert_id"], ["sequence", .. AlertColumns], "alert/");
        Compare(
            "assessment_heads", ["site", "source", "criterion", "scope"], ["window_end", "revision", "assessment_id"],
            "assessments", ["site", "source", "criterion", "scope"], ["window_end", "revision", "id"], "head/");
    }

    /// <summary>Each row of a derived table must equal the last of the rows with its key; the rows that it is made from decide the order by their leading columns.</summary>
    private void Compare(string derived, string[] key, string[] columns, string origin, string[] originKey, string[] originColumns, string prefix)
    {
        try
        {
            Dictionary<string, string[]> last = new(StringComparer.Ordinal);
            Read(origin, originKey, originColumns, (name, values) =>
            {
                if (!last.TryGetValue(name, out string[]? known) || IsLater(values, known))
                {
                    last[name] = values;
                }
            });
            Read(derived, key, columns, (name, values) => CompareRow(derived, prefix + Shown(name), columns, values, last.Remove(name, out string[]? expected) ? expected : null));
            foreach (string name in last.Keys)
            {
                findings.Add(new TrailFinding(TrailCodes.DerivedDiffers, derived, prefix + Shown(name), null, "The row is missing.", Rebuild));
            }
        }
        catch (UnreadableException exception)
        {
            findings.Add(Unreadable.Table(derived, exception.Message));
        }
    }

    private void CompareRow(string table, string id, string[] columns, string[] found, string[]? expected)
    {
        if (expected is null)
        {
            findings.Add(new TrailFinding(TrailCodes.DerivedDiffers, table, id, null, "There is nothing that the row follows from.", Rebuild));
            return;
        }

        for (int i = 0; i < columns.Length; i++)
        {
            if (found[i] != expected[i])
            {
                findings.Add(new TrailFinding(TrailCodes.DerivedDiffers, table, id, columns[i], "The value is not that of the last record that the row follows from.", Rebuild));
                return;
            }
        }
    }

    private void Read(string table, string[] key, string[] columns, Action<string, string[]> take)
    {
        using TableScan scan = records.Scan($"SELECT {string.Join(", ", key.Concat(columns))} FROM {table}{records.WholeTable}");
        while (scan.Read())
        {
            string name = string.Join('/', Enumerable.Range(0, key.Length).Select(place => Cell(scan, place)));
            take(name, [.. Enumerable.Range(key.Length, columns.Length).Select(place => Cell(scan, place))]);
        }
    }

    /// <summary>Whether the leading numbers of a row are higher: the columns that decide come first and are whole.</summary>
    private static bool IsLater(string[] values, string[] known)
    {
        for (int i = 0; i < 2; i++)
        {
            if (!long.TryParse(values[i], System.Globalization.CultureInfo.InvariantCulture, out long left)
                || !long.TryParse(known[i], System.Globalization.CultureInfo.InvariantCulture, out long right))
            {
                return true;
            }

            if (left != right)
            {
                return left > right;
            }
        }

        return true;
    }

    /// <summary>UUIDs are stored in capitals and shown in small letters; the other keys are small anyway.</summary>
    private static string Shown(string key) => Guid.TryParseExact(key, "D", out Guid id) ? id.ToString("D") : key;

    private static string Cell(TableScan scan, int place) => scan.Kind(place) switch
    {
        CellKind.Null => "\0",
        CellKind.Whole or CellKind.Truth => FormattableString.Invariant($"{scan.Whole(place)}"),
        CellKind.Real => FormattableString.Invariant($"{scan.Real(place):R}"),
        CellKind.Bytes => "\u0001" + Convert.ToHexStringLower(scan.Bytes(place)),
        _ => Encoding.Latin1.GetString(scan.Bytes(place)),
    };
}
