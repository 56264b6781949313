using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Readings;

/// <summary>Registers the readings at rest.</summary>
public static class ReadingsServiceCollectionExtensions
{
    /// <summary>
    /// Adds <see cref="IReadingStore"/>, <see cref="IReadingStoreHealth"/>, <see cref="IReadingSealer"/> and <see cref="IQuarantine"/> in the
    /// data directory of the options, and the background sealing. May be called again; the first registration stays.
    /// </summary>
    /// <param name="services">The services.</param>
    /// <param name="options">Where and how; validate them first.</param>
    public static IServiceCollection AddLabWatchReadings(this IServiceCollection services, ReadingsOptions options)
    {
        ArgumentNullException.ThrowIfNull(services);
        ArgumentNullException.ThrowIfNull(options);
        services.TryAddSingleton(options);
        services.TryAddSingleton(TimeProvider.System);
        services.TryAddSingleton<SqliteReadingStore>();
        services.TryAddSingleton<IReadingStore>(provider => provider.GetRequiredService<SqliteReadingStore>());
        services.TryAddSingleton<IReadingSealer>(provider => provider.GetRequiredService<SqliteReadingStore>());
        services.TryAddSingleton<IReadingStoreHealth>(provider => provider.GetRequiredService<SqliteReadingStore>());
        services.TryAddSingleton<IQuarantine, SqliteQuarantine>();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, SealingService>());
        return services;
    }
}
