using System.Data.Common;

namespace LabWatch.Readings.Engine;

/// <summary>One database connection with its prepared statements. Not thread-safe.</summary>
internal sealed class StoreConnection(DbConnection connection) : IDisposable
{
    private readonly Dictionary<string, DbCommand> _commands = [];

    public DbTransaction Begin() => connection.BeginTransaction();

    /// <summary>A prepared statement with its parameters set, in the order in which they stand in the text.</summary>
    public DbCommand Command(DbTransaction? transaction, string sql, params ReadOnlySpan<object?> values)
    {
        if (!_commands.TryGetValue(sql, out DbCommand? command))
        {
            command = Prepare(sql);
            _commands.Add(sql, command);
        }

        command.Transaction = transaction;
        for (int i = 0; i < values.Length; i++)
        {
            command.Parameters[i].Value = values[i] ?? DBNull.Value;
        }

        return command;
    }

    public int Execute(DbTransaction? transaction, string sql, params ReadOnlySpan<object?> values) =>
        Command(transaction, sql, values).ExecuteNonQuery();

    public DbDataReader Query(string sql, params ReadOnlySpan<object?> values) => Command(null, sql, values).ExecuteReader();

    /// <summary>The single number that a query gives.</summary>
    public long Number(DbTransaction? transaction, string sql, params ReadOnlySpan<object?> values)
    {
        using DbDataReader reader = Command(transaction, sql, values).ExecuteReader();
        return reader.Read() ? reader.GetInt64(0) : 0;
    }

    public void Dispose()
    {
        foreach (DbCommand command in _commands.Values)
        {
            command.Dispose();
        }

        connection.Dispose();
    }

    private DbCommand Prepare(string sql)
    {
        DbCommand command = connection.CreateCommand();
#pragma warning disable CA2100 // Every statement is a constant of the dialect.
        command.CommandText = sql;
#pragma warning restore CA2100
        foreach (string name in ParameterNames(sql))
        {
            DbParameter parameter = command.CreateParameter();
            parameter.ParameterName = name;
            command.Parameters.Add(parameter);
        }

        return command;
    }

    private static IEnumerable<string> ParameterNames(string sql)
    {
        for (int at = sql.IndexOf('@', StringComparison.Ordinal); at >= 0; at = sql.IndexOf('@', at + 1))
        {
            int end = at + 1;
            while (end < sql.Length && char.IsAsciiLetter(sql[end]))
            {
                end++;
            }

            yield return sql[at..end];
        }
    }
}
