using LabWatch.Evidence.Recording;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Evidence;

/// <summary>Registers what is kept and made for auditors.</summary>
public static class EvidenceServices
{
    /// <summary>Adds the recorder of sealed hours. Calling it again changes nothing. Needs the readings, the records and the lab.</summary>
    public static IServiceCollection AddLabWatchEvidence(this IServiceCollection services)
    {
        ArgumentNullException.ThrowIfNull(services);
        services.TryAddSingleton<SealedHourRecorder>();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, SealedHourService>());
        return services;
    }
}
