using System.Net;
using System.Net.Sockets;

namespace LabWatch.SystemTests.Intake;

/// <summary>A link in the middle that can be frozen: connections stay open and nothing comes through, as when a cable is pulled far away.</summary>
internal sealed class FreezableProxy : IDisposable
{
    private readonly TcpListener _listener = new(IPAddress.Loopback, 0);
    private readonly CancellationTokenSource _stop = new();
    private readonly int _target;
    private volatile bool _frozen;

    public FreezableProxy(int target)
    {
        _target = target;
        _listener.Start();
        Port = ((IPEndPoint)_listener.LocalEndpoint).Port;
        _ = AcceptAsync();
    }

    public int Port { get; }

    /// <summary>Freezes all connections that are open and all that come.</summary>
    public void Freeze() => _frozen = true;

    /// <summary>Lets new connections through; those that were frozen stay so.</summary>
    public void Thaw() => _frozen = false;

    public void Dispose()
    {
        _stop.Cancel();
        _listener.Dispose();
        _stop.Dispose();
    }

    private async Task AcceptAsync()
    {
        try
        {
            while (true)
            {
                TcpClient near = await _listener.AcceptTcpClientAsync(_stop.Token);
                _ = ServeAsync(near);
            }
        }
        catch (Exception exception) when (exception is OperationCanceledException or SocketException or ObjectDisposedException)
        {
            // The test is over.
        }
    }

    private async Task ServeAsync(TcpClient near)
    {
        using (near)
        using (var far = new TcpClient())
        {
            try
            {
                await far.ConnectAsync(IPAddress.Loopback, _target, _stop.Token);
                await Task.WhenAny(PumpAsync(near.GetStream(), far.GetStream()), PumpAsync(far.GetStream(), near.GetStream()));
            }
            catch (Exception exception) when (exception is OperationCanceledException or IOException or SocketException)
            {
                // One side went away.
            }
        }
    }

    private async Task PumpAsync(NetworkStream from, NetworkStream to)
    {
        byte[] buffer = new byte[16 << 10];
        bool frozen = false;
        for (int read; (read = await from.ReadAsync(buffer, _stop.Token)) > 0;)
        {
            frozen |= _frozen;
            if (!frozen)
            {
                await to.WriteAsync(buffer.AsMemory(0, read), _stop.Token);
            }
        }
    }
}
