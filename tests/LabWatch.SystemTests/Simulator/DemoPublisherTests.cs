using LabWatch.Simulator.Demo;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;

namespace LabWatch.SystemTests.Simulator;

/// <summary>The demo over a real socket: restarts, a broker that goes away, a broker that refuses.</summary>
public sealed class DemoPublisherTests
{
    private static readonly string[] Sources = ["fir", "rowan", "yew", "hazel"];

    [Fact]
    public async Task Publisher_StoppedForAnHourAndStartedAgain_LeavesNoHoleAndNoContradiction()
    {
        using TemporaryDirectory data = new();
        await using RecordingBroker broker = await RecordingBroker.StartAsync();
        await using (Demo first = await Demo.StartAsync(broker.Port, data.Path, TimeSpan.Zero))
        {
            await Reach(() => broker.TimesOf("hazel").Length >= 4);
        }

        double ended = broker.TimesOf("fir")[^1];
        await using (Demo second = await Demo.StartAsync(broker.Port, data.Path, TimeSpan.FromHours(1)))
        {
            await Reach(() => second.Progress.Current.Done && broker.TimesOf("hazel")[^1] > ended + 3602);
        }

        Assert.Empty(broker.Contradictions);
        Assert.All(Sources, source => AssertNoHole(broker.TimesOf(source), 10));
    }

    [Fact]
    public async Task Publisher_BrokerRefusesAndThenGoesAway_SendsEverySecondInTheEnd()
    {
        using TemporaryDirectory data = new();
        RecordingBroker broker = await RecordingBroker.StartAsync();
        broker.RefuseNext(3);
        await using Demo demo = await Demo.StartAsync(broker.Port, data.Path, TimeSpan.Zero);
        await Reach(() => broker.TimesOf("hazel").Length >= 3);
        await broker.DisposeAsync();
        double lost = broker.TimesOf("fir")[^1];
        await using RecordingBroker again = await RecordingBroker.StartAsync(broker.Port, broker);
        await Reach(() => again.TimesOf("hazel")[^1] > lost + 3);

        Assert.Empty(broker.Contradictions);
        Assert.Empty(again.Contradictions);
        Assert.All(Sources, source => AssertNoHole(again.TimesOf(source), 1));
    }

    private static void AssertNoHole(double[] times, double longest) =>
        Assert.All(times.Zip(times.Skip(1)), pair => Assert.InRange(pair.Second - pair.First, 0.5, longest));

    private static Task Reach(Func<bool> condition) =>
        Poll.UntilAsync("the packs are there", () => Task.FromResult(condition()), TimeSpan.FromSeconds(90), TestContext.Current.CancellationToken);

    private sealed class Demo(IHost host) : IAsyncDisposable
    {
        public IDemoProgress Progress => host.Services.GetRequiredService<IDemoProgress>();

        public static async Task<Demo> StartAsync(int port, string data, TimeSpan shift)
        {
            HostApplicationBuilder builder = Host.CreateApplicationBuilder();
            builder.Services.AddSingleton<TimeProvider>(new ShiftedClock(shift));
            builder.Services.AddLabWatchDemo(new DemoOptions(0, 1, "127.0.0.1", port, data));
            IHost host = builder.Build();
            await host.StartAsync(TestContext.Current.CancellationToken);
            return new Demo(host);
        }

        public async ValueTask DisposeAsync()
        {
            await host.StopAsync();
            host.Dispose();
        }
    }
}
