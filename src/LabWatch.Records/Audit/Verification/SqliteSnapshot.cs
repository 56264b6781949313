using LabWatch.Records.Storage;
using Microsoft.Data.Sqlite;

namespace LabWatch.Records.Audit.Verification;

/// <summary>An SQLite file, read in one transaction.</summary>
internal sealed class SqliteSnapshot : RecordsSnapshot
{
    private readonly SqliteConnection _connection;

    private SqliteSnapshot(RecordsContext model, SqliteConnection connection)
        : base(model) =>
        _connection = connection;

    public override string WholeTable => " NOT INDEXED";

    public override string? RowNumber => "rowid";

    public static new SqliteSnapshot Open(RecordsOptions options, bool inUse) =>
        new(new RecordsContexts(options).Create(), SqliteReadOnly.Open(options.FilePath, inUse));

    public override TableScan Scan(string sql) => new SqliteScan(_connection, sql);

    public override void Dispose()
    {
        _connection.Dispose();
        base.Dispose();
    }
}
