using LabWatch.Records;
using LabWatch.Records.Accounts;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using LabWatch.Records.Audit;
using LabWatch.Records.LabFiles;
using LabWatch.Records.Revisions;
using LabWatch.Records.Runs;
using LabWatch.Tests.Records.Contract;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Records;

/// <summary>Records in an SQLite file in a directory of their own.</summary>
internal sealed class SqliteRecords : IRecordsUnderTest
{
    /// <summary>A migrated, empty file, made once: migrating a new one for each test is most of a test's time.</summary>
    private static readonly Lazy<Task<byte[]>> Template = new(MakeTemplateAsync);

    private readonly ServiceProvider _services;
    private readonly bool _keepDirectory;

    public SqliteRecords(string? directory = null, int busySeconds = 1)
    {
        _keepDirectory = directory is not null;
        Directory = directory ?? System.IO.Directory.CreateTempSubdirectory("labwatch-records-").FullName;
        Options = RecordsOptions.InDirectory(Directory) with { BusyTimeout = TimeSpan.FromSeconds(busySeconds) };
        _services = new ServiceCollection().AddLabWatchRecords(Options).BuildServiceProvider();
    }

    public string Directory { get; }

    public RecordsOptions Options { get; }

    public IAssessmentLedger Assessments => _services.GetRequiredService<IAssessmentLedger>();

    public IAlertLedger Alerts => _services.GetRequiredService<IAlertLedger>();

    public IAccountLedger Accounts => _services.GetRequiredService<IAccountLedger>();

    public ISessionLedger Sessions => _services.GetRequiredService<ISessionLedger>();

    public ILabImportLedger LabImports => _services.GetRequiredService<ILabImportLedger>();

    public IRunLedger Runs => _services.GetRequiredService<IRunLedger>();

    public ILabRecords LabRecords => _services.GetRequiredService<ILabRecords>();

    public TrailHeads Heads => _services.GetRequiredService<TrailHeads>();

    public IPositionLedger Positions => _services.GetRequiredService<IPositionLedger>();

    public IAuditLedger Audit => _services.GetRequiredService<IAuditLedger>();

    /// <summary>Empty records, from a copy of a migrated file.</summary>
    public static async ValueTask<SqliteRecords> CopyAsync()
    {
        SqliteRecords records = new();
        await File.WriteAllBytesAsync(records.Options.FilePath, await Template.Value);
        return records;
    }

    /// <summary>The same, as the contracts take it.</summary>
    public static async ValueTask<IRecordsUnderTest> OpenAsync() => await CopyAsync();

    public SqliteConnection Connect() => new($"Data Source={Options.FilePath};Pooling=False");

    public async ValueTask DisposeAsync()
    {
        await _services.DisposeAsync();
        SqliteConnection.ClearAllPools();
        if (!_keepDirectory)
        {
            System.IO.Directory.Delete(Directory, recursive: true);
        }
    }

    private static async Task<byte[]> MakeTemplateAsync()
    {
        string directory = System.IO.Directory.CreateTempSubdirectory("labwatch-records-").FullName;
        string file;
        await using (SqliteRecords records = new(directory))
        {
            await records.Assessments.LatestAsync(CancellationToken.None);
            await using SqliteConnection connection = records.Connect();
            await connection.OpenAsync();
            await using SqliteCommand copy = connection.CreateCommand();
            file = System.IO.Path.Combine(directory, "template.db");
            copy.CommandText = $"VACUUM INTO '{file}';";
            await copy.ExecuteNonQueryAsync();
        }

        byte[] bytes = await File.ReadAllBytesAsync(file);
        System.IO.Directory.Delete(directory, recursive: true);
        return bytes;
    }
}
