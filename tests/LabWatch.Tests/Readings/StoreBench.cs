using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.Logging.Abstractions;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Readings;

/// <summary>A SQLite store in a folder of its own with a clock that only the test moves.</summary>
internal sealed class StoreBench : IAsyncDisposable
{
    public static readonly SourceKey Fir = new("hollin-vale", "fir");
    public static readonly SourceKey Yew = new("hollin-vale", "yew");
    public static readonly Instant Noon = Instant.FromUnixSeconds(1_764_590_400);

    private readonly TemporaryDirectory _directory = new();

    public StoreBench(ReadingsOptions? options = null)
    {
        Options = (options ?? new ReadingsOptions { DataDirectory = "" }) with { DataDirectory = _directory.Path };
        Store = Make();
    }

    public static CancellationToken Token => TestContext.Current.CancellationToken;

    public FakeTimeProvider Clock { get; } = new(Noon.ToDateTimeOffset());

    public ReadingsOptions Options { get; private set; }

    public SqliteReadingStore Store { get; private set; }

    /// <summary>Runs on each connection that the store opens for writing.</summary>
    public Action<SqliteConnection>? OnWriterOpened { get; set; }

    public string Folder => Options.DataDirectory;

    public string Database => Path.Combine(Folder, SqliteReadingStore.FileName);

    public static ReadingPack Pack(SourceKey source, Instant time, params double[] values) =>
        new(source, time, [.. values.Select((value, i) => new Reading($"t{i}", time, value))]);

    public ValueTask<AppendResult> AppendAsync(double seconds, params double[] values) =>
        Store.AppendAsync([Pack(Fir, Noon + TimeSpan.FromSeconds(seconds), values)], Token);

    public async ValueTask<double[]> ValuesAsync(string channel = "t0", double fromHour = -1000, double toHour = 1000)
    {
        ReadingWindow window = await Store.ReadAsync(Fir, [channel], new TimeWindow(Noon + TimeSpan.FromHours(fromHour), Noon + TimeSpan.FromHours(toHour)), Token);
        return window.Find(channel)?.Values.ToArray() ?? [];
    }

    public async ValueTask ReopenAsync()
    {
        await Store.DisposeAsync();
        Store = Make();
    }

    /// <summary>Copies the files as they are now, as a kill at this moment would leave them, and goes on with the copy.</summary>
    public async ValueTask CrashAsync(Action<string>? damage = null)
    {
        string copy = Path.Combine(_directory.Path, $"crash-{Guid.NewGuid():N}");
        Directory.CreateDirectory(copy);
        foreach (string file in Directory.GetFiles(Folder).Where(file => !file.EndsWith(".lock", StringComparison.Ordinal)))
        {
            await using FileStream from = new(file, FileMode.Open, FileAccess.Read, FileShare.ReadWrite | FileShare.Delete);
            await using FileStream to = File.Create(Path.Combine(copy, Path.GetFileName(file)));
            await from.CopyToAsync(to, Token);
        }

        await Store.DisposeAsync();
        Options = Options with { DataDirectory = copy };
        File.Delete(Path.Combine(copy, SqliteReadingStore.FileName + "-shm"));
        damage?.Invoke(copy);
        Store = Make();
    }

    /// <summary>Runs SQL on the closed database.</summary>
    public void Sql(string sql)
    {
        using SqliteConnection connection = Connect();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }

    public long Number(string sql)
    {
        using SqliteConnection connection = Connect();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        return (long)command.ExecuteScalar()!;
    }

    public SqliteConnection Connect()
    {
        SqliteConnection connection = new($"Data Source={Database};Pooling=False;Default Timeout=1");
        connection.Open();
        return connection;
    }

    public async ValueTask DisposeAsync()
    {
        await Store.DisposeAsync();
        _directory.Dispose();
    }

    private SqliteReadingStore Make() => new(Options, Clock, NullLogger<SqliteReadingStore>.Instance, connection => OnWriterOpened?.Invoke(connection));
}
