namespace LabWatch.Records;

/// <summary>The database engine that keeps the records.</summary>
public enum RecordsProvider
{
    /// <summary>One SQLite file in the data directory; the default.</summary>
    Sqlite,

    /// <summary>A PostgreSQL server, for several nodes on one set of records.</summary>
    PostgreSql,
}
