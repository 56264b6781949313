using System.Diagnostics;
using System.Net;
using System.Net.Sockets;
using LabWatch.Readings;

namespace LabWatch.SystemTests.Readings;

/// <summary>
/// An InfluxDB 1.x server of the test's own, from the machine's package, on free ports of 127.0.0.1, with its data in a temporary
/// directory. <see cref="WhyNot"/> says why there is none.
/// </summary>
public sealed class InfluxServer : IAsyncLifetime
{
    private const string Program = "/usr/bin/influxd";

    private readonly string _directory = Directory.CreateTempSubdirectory("labwatch-influxdb-").FullName;
    private readonly HttpClient _http = new() { Timeout = TimeSpan.FromSeconds(2) };
    private readonly int _port = FreePort();
    private Process? _process;
    private int _databases;

    /// <summary>Why no server runs; null where one does.</summary>
    public string? WhyNot { get; private set; }

    public int Port => _port;

    /// <summary>Options for a database of its own.</summary>
    public InfluxDbReadingsOptions NewDatabase()
    {
        Assert.SkipWhen(WhyNot is not null, WhyNot ?? string.Empty);
        return new InfluxDbReadingsOptions { Url = $"http://127.0.0.1:{_port}", WritePath = "/write", Database = $"readings_{Interlocked.Increment(ref _databases)}" };
    }

    public async ValueTask InitializeAsync()
    {
        if (!File.Exists(Program))
        {
            WhyNot = "influxd is not installed (Debian package influxdb).";
            return;
        }

        await File.WriteAllTextAsync(Path.Combine(_directory, "influxdb.conf"), $"""
            reporting-disabled = true
            bind-address = "127.0.0.1:{FreePort()}"
            [meta]
              dir = "{_directory}/meta"
            [data]
              dir = "{_directory}/data"
              wal-dir = "{_directory}/wal"
              query-log-enabled = false
            [monitor]
              store-enabled = false
            [http]
              bind-address = "127.0.0.1:{_port}"
              log-enabled = false
            [ifql]
              bind-address = "127.0.0.1:{FreePort()}"
            """);
        await StartAsync();
    }

    /// <summary>Starts the server on the same port and data, and waits until it answers.</summary>
    public async Task StartAsync()
    {
        ProcessStartInfo start = new(Program, ["-config", Path.Combine(_directory, "influxdb.conf")]) { RedirectStandardError = true, RedirectStandardOutput = true };
        _process = Process.Start(start)!;
        _process.OutputDataReceived += static (_, _) => { };
        _process.ErrorDataReceived += static (_, _) => { };
        _process.BeginOutputReadLine();
        _process.BeginErrorReadLine();
        await Poll.UntilAsync("InfluxDB answers", AnswersAsync, TimeSpan.FromSeconds(120), CancellationToken.None);
    }

    /// <summary>Kills the server: what it had not forced to the disk is up to the operating system.</summary>
    public async Task KillAsync()
    {
        _process!.Kill();
        await _process.WaitForExitAsync();
        _process.Dispose();
        _process = null;
    }

    /// <summary>Stops the process without ending it, or lets it go on.</summary>
    public async Task SignalAsync(string signal)
    {
        using Process kill = Process.Start("kill", [$"-{signal}", _process!.Id.ToString(System.Globalization.CultureInfo.InvariantCulture)]);
        await kill.WaitForExitAsync();
    }

    public async ValueTask DisposeAsync()
    {
        if (_process is not null)
        {
            await KillAsync();
        }

        _http.Dispose();
        Directory.Delete(_directory, recursive: true);
    }

    private async Task<bool> AnswersAsync()
    {
        try
        {
            using HttpResponseMessage answer = await _http.GetAsync(new Uri($"http://127.0.0.1:{_port}/ping"));
            return answer.IsSuccessStatusCode;
        }
        catch (Exception error) when (error is HttpRequestException or OperationCanceledException)
        {
            return false;
        }
    }

    private static int FreePort()
    {
        using TcpListener listener = new(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }
}
