using System.Collections.Concurrent;
using System.Collections.Immutable;
using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Metadata;

namespace LabWatch.Records.Audit.Covered;

/// <summary>The columns of covered tables, taken from the model in the order of their names (UTF-16 code units, as RFC 8785 asks).</summary>
internal static class CoveredColumns
{
    private static readonly ConcurrentDictionary<(Type Context, Type Row), ImmutableArray<CoveredColumn>> Known = new();

    /// <summary>The columns that the digest of a row covers.</summary>
    public static ImmutableArray<CoveredColumn> Of(DbContext context, CoveredTable table) =>
        Known.GetOrAdd((context.GetType(), table.Row), _ => [.. Read(context.Model.FindEntityType(table.Row)!, table)]);

    /// <summary>Name of the table in the database.</summary>
    public static string TableName(DbContext context, CoveredTable table) => context.Model.FindEntityType(table.Row)!.GetTableName()!;

    private static IEnumerable<CoveredColumn> Read(IEntityType entity, CoveredTable table) => entity.GetProperties()
        .Select(property => new CoveredColumn(property.GetColumnName(), FormOf(property.ClrType), property.GetGetter().GetClrValue))
        .Where(column => !table.Derived.Contains(column.Name, StringComparer.Ordinal))
        .OrderBy(column => column.Name, StringComparer.Ordinal);

    private static CoveredForm FormOf(Type type)
    {
        Type form = Nullable.GetUnderlyingType(type) ?? type;
        return form == typeof(string) ? CoveredForm.Text
            : form == typeof(long) || form == typeof(int) ? CoveredForm.Whole
            : form == typeof(double) ? CoveredForm.Real
            : form == typeof(bool) ? CoveredForm.Truth
            : form == typeof(Guid) ? CoveredForm.Uuid
            : form == typeof(byte[]) ? CoveredForm.Bytes
            : throw new NotSupportedException($"A covered column cannot be of type {form.Name}.");
    }
}
