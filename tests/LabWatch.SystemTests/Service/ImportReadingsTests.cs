using System.Collections.Concurrent;
using System.Globalization;
using System.Security.Cryptography.X509Certificates;
using System.Text;
using System.Text.Json;
using LabWatch.Lab.Time;
using MQTTnet;
using MQTTnet.Protocol;

namespace LabWatch.SystemTests.Service;

/// <summary>A laboratory brings its past in: first beside the running service, by an account of a device, then into the data directory of a stopped one.</summary>
public sealed class ImportReadingsTests
{
    private const int Rows = 3_000;

    [Fact]
    public async Task Readings_of_the_past_come_in_beside_a_running_service_and_into_a_stopped_one()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory files = new();
        await using ServiceFixture fixture = new();
        fixture.Environment["LABWATCH__Web__Certificate"] = "own";
        fixture.Environment["LABWATCH__Intake__EmbeddedBroker__Tls"] = "true";
        fixture.Environment["LABWATCH__Intake__EmbeddedBroker__RequireAccounts"] = "true";
        await fixture.StartAsync(token);
        Instant first = (Instant.Now(TimeProvider.System) - TimeSpan.FromDays(3)).StartOfHour();
        string file = files.At("past.csv");
        var text = new StringBuilder("time,well-1\n");
        for (int i = 0; i < Rows; i++)
        {
            text.Append(CultureInfo.InvariantCulture, $"{first + TimeSpan.FromSeconds(i)},{100 + (i / 1000.0)}\n");
        }

        text.Append("yesterday,1\n");
        await File.WriteAllTextAsync(file, text.ToString(), token);
        string[] command = ["import", "readings", file, "--data", fixture.Data, "--source", "fir"];

        (int exitCode, string output) = await LabWatchProcess.RunAsync([.. command, "--dry-run"], token);
        Assert.True(exitCode == 2 && output.Contains($"{Rows} readings are good; nothing was changed; 1 rows refused", StringComparison.Ordinal), output);
        Assert.Contains($"line {Rows + 2}", output, StringComparison.Ordinal);

        JsonElement device = await fixture.Service.PostAsync("api/v1/devices", new { name = "importer", source = "sample.fir" }, token);
        string password = device.GetProperty("password").GetString()!;
        using X509Certificate2 own = X509CertificateLoader.LoadPkcs12FromFile(Path.Combine(fixture.Data, "keys", "web.pfx"), null);
        await File.WriteAllTextAsync(files.At("own.pem"), own.ExportCertificatePem(), token);
        await HearStateAsync(fixture, own, password, token);

        Directory.CreateDirectory(Path.Combine(fixture.Data, "secrets"));
        await File.WriteAllTextAsync(Path.Combine(fixture.Data, "secrets", "importer"), password, token);
        (exitCode, output) = await LabWatchProcess.RunAsync(
            [.. command, "--broker", $"127.0.0.1:{fixture.BrokerPort}", "--tls", "--authorities", files.At("own.pem"), "--user", "importer", "--password-secret", "importer"], token);
        Assert.True(exitCode == 2 && output.Contains($"{Rows} readings published and acknowledged", StringComparison.Ordinal), output);
        Assert.Equal(Rows, await CountAsync(fixture, first, token));

        (exitCode, output) = await LabWatchProcess.RunAsync(command, token);
        Assert.True(exitCode == 2 && output.Contains("Another LabWatch is using this data directory", StringComparison.Ordinal), output);
        await fixture.Service.StopAsync(token);
        await File.AppendAllTextAsync(file, $"{first + TimeSpan.FromSeconds(Rows)},200\n", token);
        (exitCode, output) = await LabWatchProcess.RunAsync(command, token);
        Assert.True(exitCode == 2 && output.Contains($"1 readings stored, {Rows} were there already, 0 are in conflict", StringComparison.Ordinal), output);
        await fixture.StartAsync(token);
        Assert.Equal(Rows + 1, await CountAsync(fixture, first, token));
    }

    /// <summary>The state of the source and of the service, as a display in the laboratory hears them from the service's own broker.</summary>
    private static async Task HearStateAsync(ServiceFixture fixture, X509Certificate2 own, string password, CancellationToken token)
    {
        using IMqttClient display = new MqttClientFactory().CreateMqttClient();
        ConcurrentDictionary<string, string> heard = new();
        display.ApplicationMessageReceivedAsync += e =>
        {
            heard[e.ApplicationMessage.Topic] = e.ApplicationMessage.ConvertPayloadToString();
            return Task.CompletedTask;
        };
        MqttClientOptions options = new MqttClientOptionsBuilder()
            .WithTcpServer("127.0.0.1", fixture.BrokerPort).WithClientId("display").WithCredentials("importer", password).WithTimeout(TimeSpan.FromSeconds(60))
            .WithTlsOptions(tls => tls.WithTrustChain([own]).WithTargetHost("127.0.0.1").WithRevocationMode(X509RevocationMode.NoCheck))
            .Build();
        await display.ConnectAsync(options, token);
        await display.SubscribeAsync("lab-out/#", MqttQualityOfServiceLevel.AtLeastOnce, token);
        await Poll.UntilAsync("the state is told", () => Task.FromResult(heard.ContainsKey("lab-out/sample/fir/state") && heard.ContainsKey("lab-out/sample/alerts")), TimeSpan.FromSeconds(120), token, () => string.Join(' ', heard.Keys));
        Assert.Contains("\"unknown\"", heard["lab-out/sample/fir/state"], StringComparison.Ordinal);
        Assert.Contains(heard, said => said.Key.StartsWith("lab-out/sample/service/", StringComparison.Ordinal) && said.Value.Contains("online", StringComparison.Ordinal));
    }

    private static async Task<int> CountAsync(ServiceFixture fixture, Instant first, CancellationToken token) =>
        (await fixture.ReadAsync("well-1", first.Microseconds, (first + TimeSpan.FromHours(2)).Microseconds, token)).Count;
}
