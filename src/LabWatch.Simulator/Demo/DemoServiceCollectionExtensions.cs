using LabWatch.Lab.Findings;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Simulator.Demo;

/// <summary>Registration of the demo.</summary>
public static class DemoServiceCollectionExtensions
{
    /// <summary>
    /// Adds the demo lab: <see cref="ILabSimulation"/>, <see cref="IDemoProgress"/> and the background service that publishes. Needs logging and, where time is
    /// not the system's, a <see cref="TimeProvider"/>. A repeated call adds nothing. Throws for options that <see cref="DemoOptions.Validate"/> objects to.
    /// </summary>
    public static IServiceCollection AddLabWatchDemo(this IServiceCollection services, DemoOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        IReadOnlyList<Finding> findings = options.Validate();
        if (findings.Count > 0)
        {
            throw new ArgumentException(string.Join(Environment.NewLine, findings), nameof(options));
        }

        services.TryAddSingleton(TimeProvider.System);
        services.TryAddSingleton(options);
        services.TryAddSingleton<DemoEngine>();
        services.TryAddSingleton<ILabSimulation>(provider => provider.GetRequiredService<DemoEngine>());
        services.TryAddSingleton<IDemoProgress>(provider => provider.GetRequiredService<DemoEngine>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, DemoPublisher>());
        return services;
    }
}
