using LabWatch.Readings.Engine;
using LabWatch.Readings.Influx;
using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings;

/// <summary>Registers the readings at rest.</summary>
public static class ReadingsServiceCollectionExtensions
{
    /// <summary>
    /// Adds <see cref="IReadingStore"/>, <see cref="IReadingStoreHealth"/>, <see cref="IReadingSealer"/> and <see cref="IQuarantine"/> on the
    /// engine of the options, and the background sealing. May be called again; the first registration stays.
    /// </summary>
    /// <param name="services">The services.</param>
    /// <param name="options">Where and how; validate them first.</param>
    public static IServiceCollection AddLabWatchReadings(this IServiceCollection services, ReadingsOptions options)
    {
        ArgumentNullException.ThrowIfNull(services);
        ArgumentNullException.ThrowIfNull(options);
        services.TryAddSingleton(options);
        services.TryAddSingleton(TimeProvider.System);
        switch (options.Engine)
        {
            case ReadingsEngine.PostgreSql:
                AddStore(services, provider => PostgreSqlReadingStore.Create(options, Clock(provider), Log<BlockReadingStore>(provider)));
                services.TryAddSingleton<IQuarantine>(_ => PostgreSqlReadingStore.Quarantine(options));
                break;
            case ReadingsEngine.InfluxDb:
                AddStore(services, provider => new InfluxReadingStore(options, provider.GetRequiredService<IQuarantine>(), Clock(provider), Log<InfluxReadingStore>(provider)));
                break;
            default:
                AddStore(services, provider => new SqliteReadingStore(options, Clock(provider), Log<SqliteReadingStore>(provider)));
                break;
        }

        services.TryAddSingleton<IQuarantine, SqliteQuarantine>();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, SealingService>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, IntegrityService>());
        return services;
    }

    private static void AddStore<TStore>(IServiceCollection services, Func<IServiceProvider, TStore> make)
        where TStore : class, IReadingStore, IReadingSealer, IReadingStoreHealth
    {
        services.TryAddSingleton(make);
        services.TryAddSingleton<IReadingStore>(provider => provider.GetRequiredService<TStore>());
        services.TryAddSingleton<IReadingSealer>(provider => provider.GetRequiredService<TStore>());
        services.TryAddSingleton<IReadingStoreHealth>(provider => provider.GetRequiredService<TStore>());
    }

    private static TimeProvider Clock(IServiceProvider provider) => provider.GetRequiredService<TimeProvider>();

    private static ILogger<T> Log<T>(IServiceProvider provider) => provider.GetRequiredService<ILogger<T>>();
}
