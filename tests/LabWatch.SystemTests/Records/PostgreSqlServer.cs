using System.Diagnostics;
using System.Net;
using System.Net.Sockets;
using Npgsql;

namespace LabWatch.SystemTests.Records;

/// <summary>
/// A PostgreSQL server of the test's own, from the machine's package, on a free port of 127.0.0.1, with its data in a temporary
/// directory. <see cref="WhyNot"/> says why there is none. It refuses to run as root, so as root it runs as the package's own user.
/// </summary>
public sealed class PostgreSqlServer : IAsyncLifetime
{
    private readonly string _directory = Directory.CreateTempSubdirectory("labwatch-postgresql-").FullName;
    private readonly bool _asRoot = Environment.UserName == "root";
    private int _databases;
    private int _port;

    /// <summary>Why no server runs; null where one does.</summary>
    public string? WhyNot { get; private set; }

    private static string? Programs { get; } =
        Directory.Exists("/usr/lib/postgresql")
            ? Directory.GetDirectories("/usr/lib/postgresql").Select(version => Path.Combine(version, "bin")).Where(bin => File.Exists(Path.Combine(bin, "initdb"))).Max()
            : null;

    private string Data => Path.Combine(_directory, "data");

    /// <summary>Connection string of a new, empty database.</summary>
    public async Task<string> NewDatabaseAsync(CancellationToken cancellationToken)
    {
        Assert.SkipWhen(WhyNot is not null, WhyNot ?? string.Empty);
        string name = $"records_{Interlocked.Increment(ref _databases)}";
        await using NpgsqlConnection connection = new(ConnectionTo("postgres") + ";Pooling=false");
        await connection.OpenAsync(cancellationToken);
        await using NpgsqlCommand create = new($"CREATE DATABASE {name}", connection);
        await create.ExecuteNonQueryAsync(cancellationToken);
        return ConnectionTo(name);
    }

    /// <summary>
    /// Starts the server on the same port, or stops it at once without a checkpoint, so that the next start recovers from its log. It
    /// does not sync to the disk: the machine outlives the server here, and a slow disk would hold up recovery for minutes.
    /// </summary>
    public async Task ControlAsync(string verb) =>
        await RunAsync(
            "pg_ctl", verb, "-D", Data, "-w", "-t", "300", "-m", "immediate", "-l", Path.Combine(_directory, "log"), "-o", $"-p {_port} -k {_directory} -h 127.0.0.1 -c fsync=off");

    public async ValueTask InitializeAsync()
    {
        if (Programs is null)
        {
            WhyNot = "PostgreSQL's server programs are not installed under /usr/lib/postgresql (Debian package postgresql).";
            return;
        }

        _port = FreePort();
        if (_asRoot)
        {
            using Process chown = Process.Start("chown", ["postgres", _directory]);
            await chown.WaitForExitAsync();
        }

        await RunAsync("initdb", "-D", Data, "-U", "labwatch", "-A", "trust", "--no-sync", "-E", "UTF8", "--locale=C");
        await ControlAsync("start");
    }

    public async ValueTask DisposeAsync()
    {
        NpgsqlConnection.ClearAllPools();
        if (WhyNot is null)
        {
            await ControlAsync("stop");
        }

        Directory.Delete(_directory, recursive: true);
    }

    private string ConnectionTo(string database) => $"Host=127.0.0.1;Port={_port};Username=labwatch;Database={database};Maximum Pool Size=20;Timeout=120";

    private async Task RunAsync(string program, params string[] arguments)
    {
        string path = Path.Combine(Programs!, program);
        ProcessStartInfo start = _asRoot ? new("runuser", ["-u", "postgres", "--", path, .. arguments]) : new(path, arguments);
        start.WorkingDirectory = "/";
        start.RedirectStandardOutput = !arguments.Contains("start");
        using Process process = Process.Start(start)!;
        await process.WaitForExitAsync();
        Assert.Equal(0, process.ExitCode);
    }

    private static int FreePort()
    {
        using TcpListener listener = new(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }
}
