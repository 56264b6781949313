using LabWatch.Records;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using LabWatch.Records.LabFiles;
using LabWatch.Tests.Records.Contract;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Records;

/// <summary>Records in an SQLite file in a directory of their own.</summary>
internal sealed class SqliteRecords : IRecordsUnderTest
{
    private readonly ServiceProvider _services;
    private readonly bool _keepDirectory;

    public SqliteRecords(string? directory = null)
    {
        _keepDirectory = directory is not null;
        Directory = directory ?? System.IO.Directory.CreateTempSubdirectory("labwatch-records-").FullName;
        Options = RecordsOptions.InDirectory(Directory) with { BusyTimeout = TimeSpan.FromSeconds(1) };
        _services = new ServiceCollection().AddLabWatchRecords(Options).BuildServiceProvider();
    }

    public string Directory { get; }

    public RecordsOptions Options { get; }

    public IAssessmentLedger Assessments => _services.GetRequiredService<IAssessmentLedger>();

    public IAlertLedger Alerts => _services.GetRequiredService<IAlertLedger>();

    public ILabImportLedger LabImports => _services.GetRequiredService<ILabImportLedger>();

    public static ValueTask<IRecordsUnderTest> OpenAsync() => new(new SqliteRecords());

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
}
