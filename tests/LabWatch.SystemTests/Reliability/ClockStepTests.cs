using LabWatch.Lab.Time;
using LabWatch.SystemTests.Service;

namespace LabWatch.SystemTests.Reliability;

/// <summary>The wall clock of the service is stepped forward and back under load.</summary>
public sealed class ClockStepTests
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(120);

    [Fact]
    public async Task A_clock_stepped_forward_and_back_loses_no_reading_and_stops_nothing()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        int rounds = TestLength.Of(shortForm: 1, longForm: 10);
        TimeSpan[] offsets = TestLength.IsLong ? [TimeSpan.FromHours(1), TimeSpan.FromHours(-1), TimeSpan.Zero] : [TimeSpan.FromHours(1), TimeSpan.Zero];
        long first = (Instant.Now(TimeProvider.System) - TimeSpan.FromHours(4)).StartOfHour().Microseconds;
        using TemporaryDirectory folder = new();
        await using ServiceFixture fixture = new();
        SteppedClock clock = SteppedClock.ForOrSkip(folder.At("clock"), fixture.Environment);
        await fixture.StartAsync(token);
        await using PersistentDevice device = new(fixture.BrokerPort, "lab/sample/fir", "well-1", first);
        device.Start();
        int steps = 0;
        for (int round = 0; round < rounds; round++)
        {
            foreach (TimeSpan offset in offsets)
            {
                await MoreAsync(device, fixture, token);
                clock.Set(offset);
                steps++;
                int expected = steps;
                await Poll.UntilAsync("the step is noticed", () => Task.FromResult(Noticed(fixture) >= expected), Patience, token, () => fixture.Service.Output);
                await MoreAsync(device, fixture, token);
                await fixture.Service.WaitUntilReadyAsync(token);
            }
        }

        await device.FinishAsync(Patience);
        IReadOnlyList<(long Time, double Value)> stored = await fixture.ReadAsync("well-1", first, device.Acknowledged.Keys.Max() + 1, token);
        Dictionary<long, double> byTime = stored.GroupBy(reading => reading.Time).ToDictionary(group => group.Key, group => group.First().Value);
        int lost = device.Acknowledged.Count(sent => !byTime.TryGetValue(sent.Key, out double value) || value != sent.Value);
        int doubled = stored.Count - byTime.Count;
        (int code, string output) = await LabWatchProcess.RunAsync(["verify", "--data", fixture.Data], token);
        ReliabilityReport.Record(
            "service with its own broker", "wall clock stepped forward and back by an hour or two under load", $"{steps} steps",
            "each step was noticed; readings, planner and health went on; verified against the trail", device.Acknowledged.Count, lost, doubled);
        Assert.Equal((0, 0), (lost, doubled));
        Assert.True(code == 0, output);
    }

    private static int Noticed(ServiceFixture fixture) => fixture.Service.Output.Split('\n').Count(line => line.Contains("clock stepped by", StringComparison.OrdinalIgnoreCase));

    private static Task MoreAsync(PersistentDevice device, ServiceFixture fixture, CancellationToken token)
    {
        int before = device.Acknowledged.Count;
        return Poll.UntilAsync("readings are acknowledged", () => Task.FromResult(device.Acknowledged.Count > before + 100), Patience, token, () => fixture.Service.Output);
    }
}
