using LabWatch.Lab.Time;
using LabWatch.SystemTests.Reliability;

namespace LabWatch.SystemTests.Service;

public sealed class KillTests
{
    private static readonly int Rounds = TestLength.Of(shortForm: 3, longForm: 100);

    [Fact]
    public async Task No_acknowledged_reading_is_lost_or_doubled_when_the_service_is_killed_under_load()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        Random random = new(20_261_201);
        long first = (Instant.Now(TimeProvider.System) - TimeSpan.FromHours(2)).StartOfHour().Microseconds;
        await using ServiceFixture fixture = new();
        await fixture.StartAsync(token);
        await using PersistentDevice device = new(fixture.BrokerPort, "lab/sample/fir", "well-1", first);
        device.Start();

        for (int round = 0; round < Rounds; round++)
        {
            int before = device.Acknowledged.Count;
            await Poll.UntilAsync("readings are acknowledged", () => Task.FromResult(device.Acknowledged.Count > before + 50), TimeSpan.FromSeconds(120), token, () => fixture.Service.Output);
            await Task.Delay(TimeSpan.FromMilliseconds(random.Next(500)), TimeProvider.System, token);
            await fixture.Service.KillAsync();
            await fixture.StartAsync(token);
        }

        await device.FinishAsync(TimeSpan.FromSeconds(120));
        await AssertStored(fixture, device, first, token);
        await AssertVerified(fixture, token);

        // Once more from the disk alone: what memory held must not have helped.
        await fixture.Service.KillAsync();
        await fixture.StartAsync(token);
        await AssertStored(fixture, device, first, token);
        await fixture.Service.KillAsync();
        await AssertVerified(fixture, token);
    }

    [Fact]
    public async Task The_service_ends_cleanly_when_it_is_asked_to()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        await using ServiceFixture fixture = new();
        await fixture.StartAsync(token);

        Assert.Equal(0, await fixture.Service.StopAsync(token));
    }

    /// <summary>Beside the running service, and from what a kill left behind: no false alarm.</summary>
    private static async Task AssertVerified(ServiceFixture fixture, CancellationToken token)
    {
        (int code, string output) = await LabWatchProcess.RunAsync(["verify", "--data", fixture.Data], token);
        Assert.True(code == 0, output);
    }

    private static async Task AssertStored(ServiceFixture fixture, PersistentDevice device, long first, CancellationToken token)
    {
        long last = device.Acknowledged.Keys.Max();
        IReadOnlyList<(long Time, double Value)> stored = await fixture.ReadAsync("well-1", first, last + 1, token);
        Dictionary<long, double> byTime = stored.GroupBy(reading => reading.Time).ToDictionary(group => group.Key, group => group.First().Value);
        int doubled = stored.Count - byTime.Count;
        int lost = device.Acknowledged.Count(sent => !byTime.TryGetValue(sent.Key, out double value) || value != sent.Value);
        ReliabilityReport.Record(
            "service with its own broker", "killed (kill -9) at random moments under load", $"{Rounds} kills",
            "read back through the API, verified against the trail beside the running service and after a last kill", device.Acknowledged.Count, lost, doubled);
        Assert.Equal((0, 0), (lost, doubled));
    }
}
