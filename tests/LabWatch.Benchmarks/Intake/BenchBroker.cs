using System.Diagnostics;
using System.Globalization;
using System.Net;
using System.Net.Sockets;

namespace LabWatch.Benchmarks.Intake;

/// <summary>A mosquitto of the benchmark's own. The settings are printed with the figures.</summary>
internal sealed class BenchBroker : IDisposable
{
    public const int Window = 100;
    private const string Program = "/usr/sbin/mosquitto";
    private readonly Process _process;
    private readonly string _config = Path.GetTempFileName();

    public BenchBroker()
    {
        Port = FreePort();
        File.WriteAllLines(
            _config,
            [
                string.Create(CultureInfo.InvariantCulture, $"listener {Port} 127.0.0.1"),
                "allow_anonymous true",
                "persistence false",
                "max_queued_messages 0",
                string.Create(CultureInfo.InvariantCulture, $"max_inflight_messages {Window}"),
            ]);
        _process = Process.Start(new ProcessStartInfo(Program, ["-c", _config]) { RedirectStandardError = true })!;
        _process.ErrorDataReceived += static (_, _) => { };
        _process.BeginErrorReadLine();
    }

    public static bool IsInstalled => File.Exists(Program);

    public static string Settings => $"persistence false, max_queued_messages 0, max_inflight_messages {Window}, QoS 1, MQTT 5";

    public int Port { get; }

    public void Dispose()
    {
        _process.Kill();
        _process.WaitForExit();
        _process.Dispose();
        File.Delete(_config);
    }

    private static int FreePort()
    {
        using var listener = new TcpListener(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }
}
