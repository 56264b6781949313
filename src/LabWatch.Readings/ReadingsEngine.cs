namespace LabWatch.Readings;

/// <summary>Where readings lie.</summary>
public enum ReadingsEngine
{
    /// <summary>A file in the data directory.</summary>
    Sqlite,

    /// <summary>A schema of a PostgreSQL database.</summary>
    PostgreSql,

    /// <summary>A database (bucket) of an InfluxDB server.</summary>
    InfluxDb,
}
