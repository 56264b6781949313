using LabWatch.Readings;
using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Time.Testing;
using static LabWatch.Tests.Readings.StoreBench;

namespace LabWatch.Tests.Readings;

/// <summary>The room registers itself once, seals in the background, and stops cleanly.</summary>
public sealed class RegistrationTests
{
    [Fact]
    public async Task Registered_twice_there_is_one_store_which_is_sealed_in_the_background()
    {
        using TemporaryDirectory directory = new();
        FakeTimeProvider clock = new(Noon.ToDateTimeOffset());
        ReadingsOptions options = new() { DataDirectory = directory.Path, QuietPeriod = TimeSpan.FromSeconds(1) };
        ServiceCollection services = new();
        services.AddLogging();
        services.AddSingleton<TimeProvider>(clock);
        services.AddLabWatchReadings(options).AddLabWatchReadings(options);
        await using ServiceProvider provider = services.BuildServiceProvider();
        IReadingStore store = provider.GetRequiredService<IReadingStore>();
        Assert.Same(store, provider.GetRequiredService<IReadingSealer>());
        Assert.Same(store, provider.GetRequiredService<IReadingStoreHealth>());
        Assert.NotNull(provider.GetRequiredService<IQuarantine>());
        IHostedService sealing = Assert.Single(provider.GetServices<IHostedService>(), service => service is SealingService);
        await sealing.StartAsync(Token);
        await store.AppendAsync([Pack(Fir, Noon + TimeSpan.FromHours(-2), 1, 2)], Token);
        for (int turn = 0; turn < 1000 && (await store.SealedHoursAsync(0, 10, Token)).Count == 0; turn++)
        {
            clock.Advance(TimeSpan.FromMilliseconds(500));
            await Task.Delay(TimeSpan.FromMilliseconds(5), TimeProvider.System, Token);
        }

        Assert.Equal(2, Assert.Single(await store.SealedHoursAsync(0, 10, Token)).Readings);
        await sealing.StopAsync(Token);
    }

    [Fact]
    public void Every_option_outside_its_range_is_a_finding()
    {
        ReadingsOptions wrong = new()
        {
            DataDirectory = " ",
            QuietPeriod = TimeSpan.Zero,
            UnsealedReadingsLimit = 1,
            JournalBytesLimit = 1,
            QuarantineCountLimit = 0,
            QuarantineBytesLimit = long.MaxValue,
        };
        Assert.Equal(6, wrong.Validate().Count);
        Assert.Empty(new ReadingsOptions { DataDirectory = "data" }.Validate());
    }
}
