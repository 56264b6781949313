using System.Collections.Concurrent;
using System.Globalization;
using System.Net;
using System.Net.Sockets;
using System.Text;
using System.Text.Json;
using MQTTnet;
using MQTTnet.Protocol;
using MQTTnet.Server;

namespace LabWatch.SystemTests.Simulator;

/// <summary>A broker on a free port of this machine that keeps every pack by topic and device time, and notes a second pack of the same time that differs.</summary>
internal sealed class RecordingBroker : IAsyncDisposable
{
    private readonly MqttServer _server;
    private int _refusals;

    private RecordingBroker(int port, ConcurrentDictionary<(string Topic, double Time), string> packs)
    {
        Port = port;
        Packs = packs;
        _server = new MqttServerFactory().CreateMqttServer(new MqttServerOptionsBuilder()
            .WithDefaultEndpoint()
            .WithDefaultEndpointBoundIPAddress(IPAddress.Loopback)
            .WithDefaultEndpointBoundIPV6Address(IPAddress.None)
            .WithDefaultEndpointPort(port)
            .Build());
        _server.InterceptingPublishAsync += arguments =>
        {
            if (Interlocked.Decrement(ref _refusals) >= 0)
            {
                arguments.ProcessPublish = false;
                arguments.Response.ReasonCode = MqttPubAckReasonCode.QuotaExceeded;
            }
            else
            {
                Keep(arguments.ApplicationMessage);
            }

            return Task.CompletedTask;
        };
    }

    public int Port { get; }

    /// <summary>Text of each pack.</summary>
    public ConcurrentDictionary<(string Topic, double Time), string> Packs { get; }

    /// <summary>Packs of a time that was taken already, with another content.</summary>
    public ConcurrentBag<string> Contradictions { get; } = [];

    public static async Task<RecordingBroker> StartAsync(int? port = null, RecordingBroker? former = null)
    {
        RecordingBroker broker = new(port ?? FreePort(), former?.Packs ?? new());
        await broker._server.StartAsync();
        return broker;
    }

    /// <summary>Refuses the next packs with MQTT's "quota exceeded" (0x97).</summary>
    public void RefuseNext(int packs) => Interlocked.Exchange(ref _refusals, packs);

    /// <summary>Device times of a source's packs, rising.</summary>
    public double[] TimesOf(string source) => [.. Packs.Keys.Where(key => key.Topic == $"lab/hollin-vale/{source}").Select(key => key.Time).Order()];

    public async ValueTask DisposeAsync()
    {
        await _server.StopAsync(new MqttServerStopOptions());
        _server.Dispose();
    }

    private void Keep(MqttApplicationMessage message)
    {
        string text = Encoding.UTF8.GetString(message.Payload);
        using JsonDocument pack = JsonDocument.Parse(text);
        double time = pack.RootElement[0].GetProperty("bt").GetDouble();
        if (!Packs.TryAdd((message.Topic, time), text) && Packs[(message.Topic, time)] != text)
        {
            Contradictions.Add(string.Create(CultureInfo.InvariantCulture, $"{message.Topic} at {time}"));
        }
    }

    private static int FreePort()
    {
        using TcpListener listener = new(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }
}
