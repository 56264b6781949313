using System.Net.Sockets;
using System.Text;

namespace LabWatch.SystemTests.Service;

/// <summary>The protocol of sd_notify(3): a datagram READY=1 to the socket in NOTIFY_SOCKET once the service is up, STOPPING=1 when it ends.</summary>
public sealed class NotifyTests
{
    [Fact]
    public async Task Systemd_is_told_when_the_service_is_ready_and_when_it_stops()
    {
        Assert.SkipUnless(OperatingSystem.IsLinux(), "systemd runs on Linux only.");
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory directory = new();
        using Socket socket = new(AddressFamily.Unix, SocketType.Dgram, ProtocolType.Unspecified);
        socket.Bind(new UnixDomainSocketEndPoint(directory.At("notify")));
        await using ServiceFixture fixture = new();

        // The program asks for the name of the process that started it, which a shell copied under that name has.
        fixture.Launcher = directory.At("systemd");
        File.Copy("/bin/sh", fixture.Launcher);
        fixture.Environment["NOTIFY_SOCKET"] = directory.At("notify");

        Task<string> ready = ReceiveAsync(socket, token);
        await fixture.StartAsync(token);
        Assert.Equal("READY=1", await ready.WaitAsync(TimeSpan.FromSeconds(120), TimeProvider.System, token));

        Task<string> stopping = ReceiveAsync(socket, token);
        await fixture.Service.StopAsync(token);
        Assert.Equal("STOPPING=1", await stopping.WaitAsync(TimeSpan.FromSeconds(120), TimeProvider.System, token));
    }

    private static async Task<string> ReceiveAsync(Socket socket, CancellationToken token)
    {
        byte[] buffer = new byte[1024];
        int length = await socket.ReceiveAsync(buffer, token);
        return Encoding.UTF8.GetString(buffer, 0, length).Trim();
    }
}
