using System.Collections.Concurrent;
using System.Net;
using System.Net.Sockets;
using System.Security.Authentication;
using System.Security.Cryptography.X509Certificates;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using MQTTnet.Adapter;
using MQTTnet.Diagnostics.Logger;
using MQTTnet.Formatter;
using MQTTnet.Implementations;
using MQTTnet.Server;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>
/// Listens for devices and hands each connection to the broker, with a bound on connections and on the size of packets, which the
/// broker's own listener does not have.
/// </summary>
internal sealed class ListenerAdapter(EmbeddedBrokerOptions options, IBrokerCertificate? certificate, DeviceDesk desk) : IMqttServerAdapter
{
    private const int WriteBufferBytes = 4 << 10;
    private const int LargestWriteBufferBytes = 64 << 10;
    private readonly ConcurrentDictionary<Socket, DeviceLink?> _open = new();
    private Socket? _listener;
    private CancellationTokenSource? _stop;
    private Task _accepting = Task.CompletedTask;

    /// <inheritdoc/>
    public Func<IMqttChannelAdapter, Task>? ClientHandler { get; set; }

    /// <summary>The links to devices that are open now.</summary>
    public IEnumerable<DeviceLink> Links => _open.Values.OfType<DeviceLink>();

    /// <summary>The address and port that it listens on; null while it does not.</summary>
    public IPEndPoint? EndPoint { get; private set; }

    /// <inheritdoc/>
    public Task StartAsync(MqttServerOptions serverOptions, IMqttNetLogger logger)
    {
        if (options.Tls && certificate is null)
        {
            throw new InvalidOperationException("The embedded broker is to speak TLS and has no certificate.");
        }

        var address = IPAddress.Parse(options.Address);
        var listener = new Socket(address.AddressFamily, SocketType.Stream, ProtocolType.Tcp);
        try
        {
            if (!OperatingSystem.IsWindows())
            {
                // Lets a restart bind at once; on Windows the same option would let two processes share the port.
                listener.SetSocketOption(SocketOptionLevel.Socket, SocketOptionName.ReuseAddress, true);
            }

            listener.Bind(new IPEndPoint(address, options.Port));
            listener.Listen();
        }
        catch
        {
            listener.Dispose();
            throw;
        }

        _listener = listener;
        EndPoint = (IPEndPoint)listener.LocalEndPoint!;
        _stop = new CancellationTokenSource();
        _accepting = AcceptAsync(listener, logger, _stop.Token);
        return Task.CompletedTask;
    }

    /// <inheritdoc/>
    public async Task StopAsync()
    {
        if (_stop is { } stop)
        {
            await stop.CancelAsync();
            _listener?.Dispose();
            await _accepting;
            stop.Dispose();
            _stop = null;
            EndPoint = null;
        }

        foreach (Socket socket in _open.Keys)
        {
            socket.Dispose();
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _listener?.Dispose();
        _stop?.Dispose();
    }

    private async Task AcceptAsync(Socket listener, IMqttNetLogger logger, CancellationToken stop)
    {
        while (!stop.IsCancellationRequested)
        {
            try
            {
                Socket socket = await listener.AcceptAsync(stop);
                if (_open.Count >= options.MaximumConnections)
                {
                    IntakeLog.TooManyConnections(desk.Logger, options.MaximumConnections);
                    socket.Dispose();
                    continue;
                }

                _open[socket] = null;
                _ = Task.Run(() => ServeAsync(socket, logger), CancellationToken.None);
            }
            catch (Exception exception) when (exception is OperationCanceledException or ObjectDisposedException)
            {
                return;
            }
            catch (SocketException)
            {
                // One connection that broke while being accepted; the next one is waited for.
            }
        }
    }

    private async Task ServeAsync(Socket socket, IMqttNetLogger logger)
    {
        try
        {
            socket.NoDelay = true;
            await using var plain = new NetworkStream(socket, ownsSocket: true);
            (Stream stream, X509Certificate2? peer) = options.Tls ? await BrokerTls.AcceptAsync(plain, certificate!, options.ClientAuthorities, desk.Clock) : (plain, null);
            await using Stream owned = stream;
            using var channel = new PacketSizeGuard(
                new BatchedChannel(new MqttTcpChannel(stream, socket.LocalEndPoint, socket.RemoteEndPoint, peer)), options.MaximumPacketBytes);
            var formatter = new MqttPacketFormatterAdapter(new MqttBufferWriter(WriteBufferBytes, LargestWriteBufferBytes));
            using var link = new DeviceLink(new MqttChannelAdapter(channel, formatter, logger), desk);
            _open[socket] = link;
            if (ClientHandler is { } handler)
            {
                await handler(link);
            }
        }
        catch (Exception exception) when (exception is AuthenticationException or OperationCanceledException)
        {
            IntakeLog.HandshakeFailed(desk.Logger, socket.Connected ? socket.RemoteEndPoint?.ToString() ?? string.Empty : string.Empty, exception.Message);
        }
        catch (Exception exception) when (exception is IOException or SocketException or ObjectDisposedException)
        {
            // The device went away; it connects again when it wants to.
        }
        finally
        {
            _open.TryRemove(socket, out _);
        }
    }
}
