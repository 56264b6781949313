using System.Collections.Concurrent;
using System.Diagnostics;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Tests.Intake;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.SystemTests.Intake;

/// <summary>TLS with certificates on both sides, and what the service says about itself, against a real broker.</summary>
public sealed class MosquittoTlsTests : IDisposable
{
    private readonly TemporaryDirectory _data = new();
    private readonly TemporaryDirectory _files = new();
    private readonly TestCertificates _certificates = new();

    private static CancellationToken Stop => TestContext.Current.CancellationToken;

    public MosquittoTlsTests() => Assert.SkipWhen(MosquittoBroker.MissingReason is not null, MosquittoBroker.MissingReason ?? string.Empty);

    public void Dispose()
    {
        _certificates.Dispose();
        _data.Dispose();
        _files.Dispose();
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task Both_sides_show_certificates_and_the_service_its_password(bool mqtt311)
    {
        string passwords = await WriteFilesAsync();
        using var broker = new MosquittoBroker([.. Tls, "allow_anonymous false", $"password_file {passwords}"]);
        await broker.StartAsync(Stop);
        await using IntakeHost intake = await StartAsync(broker, options => options with { UseMqtt311 = mqtt311 });
        await intake.UntilLinkAsync(BrokerLinkState.Connected, Stop);
        using IMqttClient device = await ConnectAsync(broker);
        await device.PublishStringAsync(IntakeHost.Topic, """[{"n":"power","u":"kW","v":0.0552}]""", MqttQualityOfServiceLevel.AtLeastOnce, cancellationToken: Stop);
        await intake.UntilStoredAsync(1, Stop);
        double[] stored = await intake.StoredAsync(Stop);
        Assert.Equal(55.2, Assert.Single(stored));
    }

    [Theory]
    [InlineData("other name")]
    [InlineData("other authority")]
    [InlineData("no client certificate")]
    public async Task What_is_not_trusted_is_not_connected(string fault)
    {
        string passwords = await WriteFilesAsync();
        using var broker = new MosquittoBroker([.. Tls, "allow_anonymous false", $"password_file {passwords}"]);
        await broker.StartAsync(Stop);
        using var others = new TestCertificates();
        await File.WriteAllTextAsync(_files.At("others.pem"), others.AuthorityPem, Stop);
        await using IntakeHost intake = await StartAsync(broker, options => fault switch
        {
            "other name" => options with { ServerName = "elsewhere.example" },
            "other authority" => options with { Authorities = _files.At("others.pem") },
            _ => options with { ClientCertificate = null, ClientCertificateKey = null },
        });
        await Poll.UntilAsync("the failure is told", () => Task.FromResult(intake.State.LinkNote is not null), TimeSpan.FromSeconds(120), Stop);
        Assert.Equal(BrokerLinkState.Connecting, intake.State.Link);
        Assert.Equal(0, intake.State.Totals.Connections);
    }

    [Fact]
    public async Task The_broker_hears_that_the_service_is_there_has_stopped_or_is_lost()
    {
        using var broker = new MosquittoBroker();
        await broker.StartAsync(Stop);
        using IMqttClient reader = new MqttClientFactory().CreateMqttClient();
        var states = new ConcurrentQueue<string>();
        reader.ApplicationMessageReceivedAsync += e =>
        {
            states.Enqueue(e.ApplicationMessage.ConvertPayloadToString());
            return Task.CompletedTask;
        };
        await reader.ConnectAsync(new MqttClientOptionsBuilder().WithTcpServer("127.0.0.1", broker.Port).WithClientId("reader").Build(), Stop);
        await reader.SubscribeAsync("lab-out/hollin-vale/service/test", MqttQualityOfServiceLevel.AtLeastOnce, Stop);
        using var proxy = new FreezableProxy(broker.Port);
        await using (IntakeHost intake = await StartAsync(broker, options => options with { Tls = false, Authorities = null, ServerName = null, ClientCertificate = null, ClientCertificateKey = null, UserSecret = null, PasswordSecret = null }))
        {
            await UntilAsync(states, "online");
            await intake.StopAsync(Stop);
            await UntilAsync(states, "stopped");
        }

        await using IntakeHost second = new(_data.Path, new ExternalBrokerOptions { Host = "127.0.0.1", Port = proxy.Port, KeepAlive = TimeSpan.FromSeconds(2), AnswerWithin = TimeSpan.FromSeconds(30) });
        await second.StartAsync(Stop);
        await UntilAsync(states, "online");
        proxy.Freeze();
        await UntilAsync(states, "lost");
        proxy.Thaw();
        await UntilAsync(states, "online");
    }

    private string[] Tls => [$"cafile {_files.At("authority.pem")}", $"certfile {_files.At("server.pem")}", $"keyfile {_files.At("server.key")}", "require_certificate true"];

    private static Task UntilAsync(ConcurrentQueue<string> states, string state) => Poll.UntilAsync(
        $"the service is {state}",
        () => Task.FromResult(states.TryDequeue(out string? text) && text.Contains($"\"{state}\"", StringComparison.Ordinal)),
        TimeSpan.FromSeconds(120),
        Stop);

    private async Task<string> WriteFilesAsync()
    {
        await File.WriteAllTextAsync(_files.At("authority.pem"), _certificates.AuthorityPem, Stop);
        await File.WriteAllTextAsync(_files.At("server.pem"), _certificates.ServerPem, Stop);
        await File.WriteAllTextAsync(_files.At("server.key"), _certificates.ServerKeyPem, Stop);
        await File.WriteAllTextAsync(_files.At("client.pem"), _certificates.ClientPem, Stop);
        await File.WriteAllTextAsync(_files.At("client.key"), _certificates.ClientKeyPem, Stop);
        await File.WriteAllTextAsync(_files.At("user"), "bench", Stop);
        await File.WriteAllTextAsync(_files.At("password"), "open sesame", Stop);
        string passwords = _files.At("passwords");
        await File.WriteAllTextAsync(passwords, "bench:open sesame\n", Stop);
        using (Process hash = Process.Start("/usr/bin/mosquitto_passwd", ["-U", passwords]))
        {
            await hash.WaitForExitAsync(Stop);
        }

        if (OperatingSystem.IsLinux())
        {
            // The broker drops its privileges when started by root and must still read these.
            File.SetUnixFileMode(_files.Path, (UnixFileMode)0x1FF);
            foreach (string file in Directory.GetFiles(_files.Path))
            {
                File.SetUnixFileMode(file, (UnixFileMode)0x1A4);
            }
        }

        return passwords;
    }

    private async Task<IntakeHost> StartAsync(MosquittoBroker broker, Func<ExternalBrokerOptions, ExternalBrokerOptions> change)
    {
        ExternalBrokerOptions options = change(new ExternalBrokerOptions
        {
            Host = "127.0.0.1",
            Port = broker.Port,
            Tls = true,
            Authorities = _files.At("authority.pem"),
            ServerName = "localhost",
            ClientCertificate = _files.At("client.pem"),
            ClientCertificateKey = _files.At("client.key"),
            UserSecret = "user",
            PasswordSecret = "password",
            LongestRetry = TimeSpan.FromSeconds(1),
        });
        var intake = new IntakeHost(_data.Path, options, intake => intake with { SecretsDirectory = _files.Path });
        await intake.StartAsync(Stop);
        return intake;
    }

    private async Task<IMqttClient> ConnectAsync(MosquittoBroker broker)
    {
        IMqttClient device = new MqttClientFactory().CreateMqttClient();
        await device.ConnectAsync(
            new MqttClientOptionsBuilder()
                .WithTcpServer("localhost", broker.Port)
                .WithClientId("device")
                .WithCredentials("bench", "open sesame")
                .WithTlsOptions(tls => tls.WithTrustChain(_certificates.Authorities).WithTargetHost("localhost").WithRevocationMode(System.Security.Cryptography.X509Certificates.X509RevocationMode.NoCheck).WithClientCertificates([_certificates.Client]))
                .WithTimeout(TimeSpan.FromSeconds(60))
                .Build(),
            Stop);
        return device;
    }
}
