using System.Text;
using Npgsql;

namespace LabWatch.Records.Audit.Verification;

/// <summary>A query on a PostgreSQL database.</summary>
internal sealed class PostgreSqlScan : TableScan
{
    private readonly NpgsqlCommand _command;
    private readonly NpgsqlDataReader _reader;

    public PostgreSqlScan(NpgsqlConnection connection, NpgsqlTransaction transaction, string sql)
    {
        _command = new NpgsqlCommand(sql, connection, transaction);
        try
        {
            _reader = _command.ExecuteReader();
        }
        catch (NpgsqlException exception)
        {
            _command.Dispose();
            throw new UnreadableException(exception.Message);
        }
    }

    public override bool Read()
    {
        try
        {
            return _reader.Read();
        }
        catch (NpgsqlException exception)
        {
            throw new UnreadableException(exception.Message);
        }
    }

    public override CellKind Kind(int column)
    {
        Type type = _reader.GetFieldType(column);
        return _reader.IsDBNull(column) ? CellKind.Null
            : type == typeof(long) || type == typeof(int) ? CellKind.Whole
            : type == typeof(double) ? CellKind.Real
            : type == typeof(bool) ? CellKind.Truth
            : type == typeof(Guid) ? CellKind.Uuid
            : type == typeof(byte[]) ? CellKind.Bytes
            : CellKind.Text;
    }

    public override long Whole(int column) => _reader.GetValue(column) switch
    {
        long number => number,
        int number => number,
        bool truth => truth ? 1 : 0,
        _ => throw new UnreadableException("A column has another type than it should."),
    };

    public override double Real(int column) => _reader.GetDouble(column);

    public override ReadOnlySpan<byte> Bytes(int column) => Kind(column) switch
    {
        CellKind.Bytes => _reader.GetFieldValue<byte[]>(column),
        CellKind.Uuid => Encoding.ASCII.GetBytes(_reader.GetGuid(column).ToString("D")),
        _ => Encoding.UTF8.GetBytes(_reader.GetString(column)),
    };

    public override void Dispose()
    {
        _reader.Dispose();
        _command.Dispose();
    }
}
