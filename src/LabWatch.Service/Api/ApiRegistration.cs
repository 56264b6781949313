using System.IO.Compression;
using System.Text.Json.Serialization;
using LabWatch.Lab.Readings;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts;
using LabWatch.Service.Api.Configured;
using LabWatch.Service.Api.Health;
using LabWatch.Service.Api.Hosting;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Runs;
using LabWatch.Service.Api.Streaming;
using Microsoft.AspNetCore.ResponseCompression;
using Microsoft.Extensions.DependencyInjection.Extensions;
using OpenTelemetry.Metrics;

namespace LabWatch.Service.Api;

/// <summary>Registers what the HTTP API and the pages need besides the rooms they show.</summary>
internal static class ApiRegistration
{
    private static readonly string[] CompressedTypes =
        ["text/html", "text/css", "text/plain", "text/csv", "text/javascript", "application/javascript", "application/json", "application/problem+json", "application/manifest+json", "image/svg+xml"];

    /// <summary>Adds the API. Calling it again changes nothing.</summary>
    public static IServiceCollection AddLabWatchApi(this IServiceCollection services)
    {
        ArgumentNullException.ThrowIfNull(services);
        if (services.Any(service => service.ServiceType == typeof(SiteBoard)))
        {
            return services;
        }

        services.TryAddSingleton(TimeProvider.System);
        services.TryAddSingleton(PagesFolder.BesideProgram);
        AddLive(services);
        AddHttp(services);
        return services;
    }

    private static void AddLive(IServiceCollection services)
    {
        services.TryAddSingleton<LiveReadings>();
        services.AddSingleton<IReadingTap>(provider => provider.GetRequiredService<LiveReadings>());
        services.TryAddSingleton<LatestAssessments>();
        services.TryAddSingleton<RecentReadings>();
        services.TryAddSingleton<ReadinessMaker>();
        services.TryAddSingleton<OpenRuns>();
        services.TryAddSingleton<RunDesk>();
        services.TryAddSingleton<RevisionDesk>();
        services.TryAddSingleton<SourceStatusMaker>();
        services.TryAddSingleton<SiteBoard>();
        services.TryAddSingleton<StreamOptions>();
        services.TryAddSingleton<StreamMetrics>();
        services.TryAddSingleton<StreamHub>();
        services.AddHostedService<ChangePump>();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IDependencyCheck, ReadingStoreCheck>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IDependencyCheck, RecordsCheck>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IDependencyCheck, BrokerCheck>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IDependencyCheck, PlannerCheck>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IDependencyCheck, AlertsCheck>());
    }

    private static void AddHttp(IServiceCollection services)
    {
        AccessRegistration.Add(services);
        RateLimits.Add(services);
        services.AddProblemDetails();
        services.ConfigureHttpJsonOptions(options =>
        {
            options.SerializerOptions.NumberHandling = JsonNumberHandling.Strict;
            options.SerializerOptions.RespectNullableAnnotations = true;
        });

        // What cannot be read at all is refused like everything else, with findings.
        services.Configure<RouteHandlerOptions>(options => options.ThrowOnBadRequest = true);
        OpenApiDocument.Add(services);
        services.AddResponseCompression(options =>
        {
            options.EnableForHttps = true;
            options.MimeTypes = CompressedTypes;
            options.Providers.Add<BrotliCompressionProvider>();
            options.Providers.Add<GzipCompressionProvider>();
        });
        services.Configure<BrotliCompressionProviderOptions>(options => options.Level = CompressionLevel.Fastest);
        services.AddOpenTelemetry().WithMetrics(metrics => metrics
            .AddMeter("LabWatch.*", "Microsoft.AspNetCore.Hosting", "Microsoft.AspNetCore.Server.Kestrel", "System.Runtime")
            .AddPrometheusExporter());
    }
}
