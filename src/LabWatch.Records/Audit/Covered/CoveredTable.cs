using System.Text.RegularExpressions;
using LabWatch.Records.Storage;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Audit.Covered;

/// <summary>
/// A table whose rows the audit trail covers. A row's subject is the template with the columns in braces replaced by their values. The
/// record digest of a row is SHA-256 over the canonical form (RFC 8785) of an object of its columns, without those that are NULL and those
/// named here as derived; so a column that a later version adds changes no digest of a row that was written before.
/// </summary>
internal sealed partial class CoveredTable
{
    private CoveredTable(Type row, Func<RecordsContext, IAsyncEnumerable<object>> rows, string subject, bool isAppendOnly, string[] derived)
    {
        Row = row;
        Rows = rows;
        IsAppendOnly = isAppendOnly;
        Derived = derived;
        Template = subject;
        Parts = [.. Split(subject)];
    }

    /// <summary>Type of the row in the model.</summary>
    public Type Row { get; }

    /// <summary>All rows, in no particular order, untracked.</summary>
    public Func<RecordsContext, IAsyncEnumerable<object>> Rows { get; }

    /// <summary>How a row is named in the trail, for example <c>run/{run_id}/{number}</c>.</summary>
    public string Template { get; }

    /// <summary>What all subjects of the table begin with, for example <c>run/</c>.</summary>
    public string Prefix => Parts[0].Text;

    /// <summary>Whether rows are never changed or deleted; where not, the last entry with a record digest tells how the row must be.</summary>
    public bool IsAppendOnly { get; }

    /// <summary>Columns that the digest leaves out.</summary>
    public IReadOnlyList<string> Derived { get; }

    /// <summary>The template, cut into texts and names of columns.</summary>
    public IReadOnlyList<(string Text, bool IsColumn)> Parts { get; }

    /// <summary>A table whose rows are only ever added.</summary>
    public static CoveredTable AppendOnly<TRow>(string subject, params string[] derived)
        where TRow : class =>
        new(typeof(TRow), RowsOf<TRow>, subject, true, derived);

    /// <summary>A table whose rows change, each change with an entry of its own.</summary>
    public static CoveredTable Changing<TRow>(string subject, params string[] derived)
        where TRow : class =>
        new(typeof(TRow), RowsOf<TRow>, subject, false, derived);

    private static IAsyncEnumerable<object> RowsOf<TRow>(RecordsContext context)
        where TRow : class =>
        context.Set<TRow>().AsNoTracking().AsAsyncEnumerable();

    private static IEnumerable<(string Text, bool IsColumn)> Split(string subject)
    {
        foreach (Match part in Piece().Matches(subject))
        {
            bool isColumn = part.Value[0] == '{';
            yield return (isColumn ? part.Value[1..^1] : part.Value, isColumn);
        }
    }

    [GeneratedRegex(@"\{[a-z_]+\}|[^{}]+")]
    private static partial Regex Piece();
}
