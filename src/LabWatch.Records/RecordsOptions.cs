using LabWatch.Lab.Findings;

namespace LabWatch.Records;

/// <summary>Where the records are kept.</summary>
/// <param name="Provider">The engine.</param>
/// <param name="DataDirectory">Absolute path of the data directory; the SQLite file is <c>records.db</c> in it. Unused by PostgreSQL.</param>
/// <param name="ConnectionString">Npgsql connection string; null for SQLite. It may hold a password: never log it.</param>
public sealed record RecordsOptions(RecordsProvider Provider, string DataDirectory, string? ConnectionString = null)
{
    /// <summary>Name of the SQLite file in the data directory.</summary>
    public const string FileName = "records.db";

    /// <summary>
    /// How long a statement waits for another process's lock, 1 s to 10 min; beyond it <see cref="RecordsUnavailableException"/> is thrown.
    /// </summary>
    public TimeSpan BusyTimeout { get; init; } = TimeSpan.FromSeconds(10);

    /// <summary>Full path of the SQLite file.</summary>
    public string FilePath => Path.Combine(DataDirectory, FileName);

    /// <summary>Records in an SQLite file in a data directory.</summary>
    public static RecordsOptions InDirectory(string dataDirectory) => new(RecordsProvider.Sqlite, dataDirectory);

    /// <summary>Everything that is wrong with the options; empty where they can be used.</summary>
    public IReadOnlyList<Finding> Validate()
    {
        List<Finding> findings = [];
        if (Provider is RecordsProvider.Sqlite && !Path.IsPathFullyQualified(DataDirectory))
        {
            findings.Add(new Finding(
                "path-not-absolute", "Records:DataDirectory", "The data directory must be an absolute path.", Finding.Quote(DataDirectory),
                "Give the full path; a service's working directory is not the one you started from."));
        }

        if (Provider is RecordsProvider.PostgreSql && string.IsNullOrWhiteSpace(ConnectionString))
        {
            findings.Add(new Finding(
                "connection-missing", "Records:ConnectionString", "PostgreSQL needs a connection string.", null,
                "Set it, the password by its secret, or use the SQLite provider."));
        }

        if (BusyTimeout < TimeSpan.FromSeconds(1) || BusyTimeout > TimeSpan.FromMinutes(10))
        {
            findings.Add(new Finding(
                "out-of-range", "Records:BusyTimeout", "The busy time-out must be between 1 s and 10 min.", BusyTimeout.ToString("c"),
                "Use 10 s unless you know why not."));
        }

        return findings;
    }
}
