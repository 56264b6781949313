using System.Text.Json;
using LabWatch.Lab.Time;
using LabWatch.SystemTests.Service;

namespace LabWatch.SystemTests.Reliability;

/// <summary>The disk of the data directory fills up under load, again and again, and is freed again; the service is not restarted meanwhile.</summary>
public sealed class DiskFullTests
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(120);

    [Fact]
    public async Task A_full_disk_is_told_to_people_loses_nothing_and_needs_no_restart()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        int rounds = TestLength.Of(shortForm: 1, longForm: 10);
        long first = (Instant.Now(TimeProvider.System) - TimeSpan.FromHours(2)).StartOfHour().Microseconds;
        await using WebhookReceiver receiver = WebhookReceiver.Start();
        await using ServiceFixture fixture = new(text => text.Replace("https://messages.example/labwatch", receiver.Address.ToString(), StringComparison.Ordinal).Replace(", \"secretName\": \"gateway-key\"", string.Empty, StringComparison.Ordinal));
        using SmallVolume volume = await SmallVolume.MountOrSkipAsync(fixture.Data, megabytes: 48, token);
        await fixture.StartAsync(token);
        await using PersistentDevice device = new(fixture.BrokerPort, "lab/sample/fir", "well-1", first);
        device.Start();
        for (int round = 0; round < rounds; round++)
        {
            int before = device.Acknowledged.Count;
            await UntilAsync("readings are acknowledged", () => device.Acknowledged.Count > before + 200, fixture, token);
            volume.Fill();
            await UntilAsync("a person is told", () => Told(receiver, "raised") > round, fixture, token);
            Assert.NotEmpty(await fixture.OpenAlertsAsync("readings-not-stored", token));
            volume.Free();
            int stuck = device.Acknowledged.Count;
            await UntilAsync("readings are acknowledged again", () => device.Acknowledged.Count > stuck + 200, fixture, token);
            await UntilAsync("the end is told", () => Told(receiver, "returned") > round, fixture, token);
        }

        await device.FinishAsync(Patience);
        (int lost, int doubled) = await CountAsync(fixture, device, first, token);
        await fixture.Service.KillAsync();
        await fixture.StartAsync(token);
        (int lostLater, int doubledLater) = await CountAsync(fixture, device, first, token);
        (int code, string output) = await LabWatchProcess.RunAsync(["verify", "--data", fixture.Data], token);
        ReliabilityReport.Record(
            "service with its own broker", "disk of the data directory full under load", $"{rounds} times on a volume of 48 MB",
            "a person was told each time and told of the end; readings went on without a restart; verified against the trail", device.Acknowledged.Count, Math.Max(lost, lostLater), Math.Max(doubled, doubledLater));
        Assert.Equal((0, 0, 0, 0), (lost, doubled, lostLater, doubledLater));
        Assert.True(code == 0, output);
    }

    private static Task UntilAsync(string what, Func<bool> isSo, ServiceFixture fixture, CancellationToken token) =>
        Poll.UntilAsync(what, () => Task.FromResult(isSo()), Patience, token, () => fixture.Service.Output);

    private static int Told(WebhookReceiver receiver, string step) => receiver.Bodies.Count(body =>
    {
        using JsonDocument document = JsonDocument.Parse(body);
        return document.RootElement.GetProperty("code").GetString() == "readings-not-stored"
            && document.RootElement.GetProperty("event").GetString()!.StartsWith(step, StringComparison.Ordinal);
    });

    private static async Task<(int Lost, int Doubled)> CountAsync(ServiceFixture fixture, PersistentDevice device, long first, CancellationToken token)
    {
        IReadOnlyList<(long Time, double Value)> stored = await fixture.ReadAsync("well-1", first, device.Acknowledged.Keys.Max() + 1, token);
        Dictionary<long, double> byTime = stored.GroupBy(reading => reading.Time).ToDictionary(group => group.Key, group => group.First().Value);
        return (device.Acknowledged.Count(sent => !byTime.TryGetValue(sent.Key, out double value) || value != sent.Value), stored.Count - byTime.Count);
    }
}
