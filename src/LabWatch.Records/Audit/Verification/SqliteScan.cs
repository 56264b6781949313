using Microsoft.Data.Sqlite;
using SQLitePCL;

namespace LabWatch.Records.Audit.Verification;

/// <summary>A query on an SQLite file, below the conversions of the data provider: bytes that are no valid text come out as they are.</summary>
internal sealed class SqliteScan : TableScan
{
    private readonly sqlite3 _database;
    private readonly sqlite3_stmt _statement;

    public SqliteScan(SqliteConnection connection, string sql)
    {
        _database = connection.Handle!;
        Check(raw.sqlite3_prepare_v2(_database, sql, out _statement));
    }

    public override bool Read()
    {
        int code = raw.sqlite3_step(_statement);
        if (code is raw.SQLITE_ROW)
        {
            return true;
        }

        return code is raw.SQLITE_DONE ? false : throw Unreadable();
    }

    public override CellKind Kind(int column) => raw.sqlite3_column_type(_statement, column) switch
    {
        raw.SQLITE_INTEGER => CellKind.Whole,
        raw.SQLITE_FLOAT => CellKind.Real,
        raw.SQLITE_TEXT => CellKind.Text,
        raw.SQLITE_BLOB => CellKind.Bytes,
        _ => CellKind.Null,
    };

    public override long Whole(int column) => raw.sqlite3_column_int64(_statement, column);

    public override double Real(int column) => raw.sqlite3_column_double(_statement, column);

    public override ReadOnlySpan<byte> Bytes(int column) => raw.sqlite3_column_blob(_statement, column);

    public override void Dispose() => _statement.Dispose();

    private void Check(int code)
    {
        if (code is not raw.SQLITE_OK)
        {
            throw Unreadable();
        }
    }

    private UnreadableException Unreadable() => new(raw.sqlite3_errmsg(_database).utf8_to_string());
}
