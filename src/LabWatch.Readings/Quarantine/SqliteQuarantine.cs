namespace LabWatch.Readings.Quarantine;

/// <summary>Refused messages in a SQLite file of their own, so that a flood of them never stands in the way of readings.</summary>
public sealed class SqliteQuarantine : TableQuarantine
{
    /// <summary>Name of the database in the data directory.</summary>
    public const string FileName = "quarantine.db";

    /// <summary>Makes the quarantine; nothing is opened yet.</summary>
    public SqliteQuarantine(ReadingsOptions options)
        : base(Table(options))
    {
    }

    private static QuarantineTable Table(ReadingsOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return new QuarantineTable(
            Path.Combine(Path.GetFullPath(options.DataDirectory), FileName), options.QuarantineCountLimit, options.QuarantineBytesLimit);
    }
}
