using System.Diagnostics;
using System.Globalization;
using System.Net;
using System.Net.Sockets;

namespace LabWatch.SystemTests.Intake;

/// <summary>A mosquitto of one test's own, on a free loopback port, with persistence in a directory of its own.</summary>
internal sealed class MosquittoBroker : IDisposable
{
    private static readonly string[] Paths = ["/usr/sbin/mosquitto", "/usr/local/sbin/mosquitto"];
    private readonly TemporaryDirectory _directory = new();
    private readonly string _config;
    private Process? _process;

    public MosquittoBroker(params string[] moreSettings)
    {
        Port = FreePort();
        _config = _directory.At("mosquitto.conf");
        File.WriteAllLines(
            _config,
            [
                string.Create(CultureInfo.InvariantCulture, $"listener {Port} 127.0.0.1"),
                "persistence true",
                $"persistence_location {_directory.Path}/",
                "max_queued_messages 0",
                .. moreSettings.Length > 0 ? moreSettings : ["allow_anonymous true"],
            ]);
        if (OperatingSystem.IsLinux())
        {
            // The broker drops its privileges when started by root and must still write here.
            File.SetUnixFileMode(_directory.Path, (UnixFileMode)0x1FF);
        }
    }

    /// <summary>Why the tests cannot run here; null where they can.</summary>
    public static string? MissingReason { get; } =
        Paths.Any(File.Exists) ? null : "mosquitto is not installed (Debian: apt-get install mosquitto).";

    public int Port { get; }

    public string Directory => _directory.Path;

    public async Task StartAsync(CancellationToken cancellationToken)
    {
        _process = Process.Start(new ProcessStartInfo(Paths.First(File.Exists), ["-c", _config])
        {
            RedirectStandardError = true,
            RedirectStandardOutput = true,
        })!;
        _process.ErrorDataReceived += static (_, _) => { };
        _process.OutputDataReceived += static (_, _) => { };
        _process.BeginErrorReadLine();
        _process.BeginOutputReadLine();
        await Poll.UntilAsync("the broker listens", ListensAsync, TimeSpan.FromSeconds(120), cancellationToken);
    }

    /// <summary>Stops it as an administrator would: sessions and retained messages are saved.</summary>
    public Task StopAsync(CancellationToken cancellationToken) => SignalAndWaitAsync("-TERM", cancellationToken);

    /// <summary>Kills it: nothing is saved.</summary>
    public Task KillAsync(CancellationToken cancellationToken) => SignalAndWaitAsync("-KILL", cancellationToken);

    /// <summary>Stops its processor time, as a machine that hangs does.</summary>
    public Task PauseAsync(CancellationToken cancellationToken) => SignalAsync("-STOP", cancellationToken);

    /// <summary>Lets it go on.</summary>
    public Task ResumeAsync(CancellationToken cancellationToken) => SignalAsync("-CONT", cancellationToken);

    public void Dispose()
    {
        if (_process is { } process)
        {
            process.Kill();
            process.WaitForExit();
            process.Dispose();
        }

        _directory.Dispose();
    }

    public static int FreePort()
    {
        using var listener = new TcpListener(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }

    private async Task SignalAsync(string signal, CancellationToken cancellationToken)
    {
        using Process kill = Process.Start("kill", [signal, _process!.Id.ToString(CultureInfo.InvariantCulture)]);
        await kill.WaitForExitAsync(cancellationToken);
    }

    private async Task SignalAndWaitAsync(string signal, CancellationToken cancellationToken)
    {
        await SignalAsync(signal, cancellationToken);
        await _process!.WaitForExitAsync(cancellationToken);
        _process.Dispose();
        _process = null;
    }

    private async Task<bool> ListensAsync()
    {
        try
        {
            using var client = new TcpClient();
            await client.ConnectAsync(IPAddress.Loopback, Port);
            return true;
        }
        catch (SocketException)
        {
            return false;
        }
    }
}
