using System.Data;
using LabWatch.Records.Storage;
using Npgsql;

namespace LabWatch.Records.Audit.Verification;

/// <summary>A PostgreSQL database, read in one transaction.</summary>
internal sealed class PostgreSqlSnapshot : RecordsSnapshot
{
    private readonly NpgsqlConnection _connection;
    private readonly NpgsqlTransaction _transaction;

    private PostgreSqlSnapshot(RecordsContext model, NpgsqlConnection connection, NpgsqlTransaction transaction)
        : base(model) =>
        (_connection, _transaction) = (connection, transaction);

    public override string WholeTable => string.Empty;

    public override string? RowNumber => null;

    public static PostgreSqlSnapshot Open(RecordsOptions options)
    {
        NpgsqlConnection connection = new(options.ConnectionString);
        try
        {
            connection.Open();
            NpgsqlTransaction transaction = connection.BeginTransaction(IsolationLevel.RepeatableRead);
            using NpgsqlCommand readOnly = new("SET TRANSACTION READ ONLY", connection, transaction);
            readOnly.ExecuteNonQuery();
            return new PostgreSqlSnapshot(new RecordsContexts(options).Create(), connection, transaction);
        }
        catch (Exception exception) when (exception is NpgsqlException or TimeoutException)
        {
            connection.Dispose();
            throw new UnreadableException(exception.Message);
        }
    }

    public override TableScan Scan(string sql) => new PostgreSqlScan(_connection, _transaction, sql);

    public override void Dispose()
    {
        _transaction.Dispose();
        _connection.Dispose();
        base.Dispose();
    }
}
