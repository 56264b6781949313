using LabWatch.Records.Audit.Covered;
using LabWatch.Records.Storage;
using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Metadata;

namespace LabWatch.SystemTests.Evidence;

/// <summary>A table whose content the verification vouches for, as the trial changes and compares it.</summary>
/// <param name="File">File of the database.</param>
/// <param name="Name">Name of the table.</param>
/// <param name="Columns">Every column that must not change.</param>
/// <param name="Subject">What the verification calls a row; columns in braces.</param>
internal sealed record TrialTable(string File, string Name, string[] Columns, string Subject)
{
    public static IReadOnlyList<TrialTable> All { get; } = [.. Records(), .. Readings()];

    /// <summary>Name of a row from its values.</summary>
    public string IdOf(IReadOnlyDictionary<string, object> row)
    {
        string id = Subject;
        foreach ((string column, object value) in row)
        {
            string text = value is string word && Guid.TryParseExact(word, "D", out Guid uuid) ? uuid.ToString("D") : Convert.ToString(value, System.Globalization.CultureInfo.InvariantCulture)!;
            id = id.Replace("{" + column + "}", text, StringComparison.Ordinal);
        }

        return id;
    }

    private static IEnumerable<TrialTable> Records()
    {
        using SqliteRecordsContext model = new(new DbContextOptionsBuilder<SqliteRecordsContext>().UseSqlite("Data Source=none").Options);
        foreach (CoveredTable table in CoveredTables.All)
        {
            IEntityType entity = model.Model.FindEntityType(table.Row)!;
            // Of an alert the derived columns are vouched for, too; other derived columns are the business of their table.
            string[] columns = [.. entity.GetProperties().Select(property => property.GetColumnName()).Where(column => entity.GetTableName() == "alerts" || !table.Derived.Contains(column))];
            yield return new TrialTable("records.db", entity.GetTableName()!, columns, table.Template);
        }

        yield return new TrialTable("records.db", "assessment_heads", ["site", "source", "criterion", "scope", "window_end", "revision", "assessment_id"], "head/{site}/{source}/{criterion}/{scope}");
        yield return new TrialTable(
            "records.db", "audit_entries", ["site", "sequence", "at", "actor", "action", "subject", "content", "record_digest", "previous", "digest"], "{site} {sequence}");
    }

    private static IEnumerable<TrialTable> Readings() =>
    [
        new("readings.db", "block", ["id", "source_id", "hour", "part", "readings", "last_change", "sealed_at", "digest", "data"], "(seal {id})"),
        new("readings.db", "summary", ["block_id", "data"], "(seal {block_id})"),
        new("readings.db", "source", ["id", "site", "source"], "{id}"),
    ];
}
