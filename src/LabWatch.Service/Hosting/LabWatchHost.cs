using LabWatch.Alerts;
using LabWatch.Assessments;
using LabWatch.Evidence;
using LabWatch.Intake;
using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Lab;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Service.Api;
using LabWatch.Service.Api.Accounts;
using LabWatch.Service.Api.Health;
using LabWatch.Service.Api.Streaming;
using LabWatch.Service.Web;
using Microsoft.Extensions.DependencyInjection.Extensions;

namespace LabWatch.Service.Hosting;

/// <summary>The composition root: puts the rooms together into one process.</summary>
internal static class LabWatchHost
{
    /// <summary>Budget of a clean stop: intake drains, the head is kept, the outbox is left for the next start.</summary>
    private static readonly TimeSpan ShutdownBudget = TimeSpan.FromSeconds(30);

    /// <summary>Builds the service; nothing runs yet.</summary>
    /// <param name="start">What was validated.</param>
    /// <param name="more">Adds what only some commands need, such as the demo.</param>
    public static WebApplication Build(ServiceStart start, Action<IServiceCollection>? more = null)
    {
        WebApplicationBuilder builder = WebApplication.CreateSlimBuilder(new WebApplicationOptions { ContentRootPath = AppContext.BaseDirectory });
        builder.Configuration.Sources.Clear();
        builder.Configuration.AddConfiguration(start.Configuration);
        builder.WebHost.UseUrls(start.Urls.Split(';', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries));
        builder.WebHost.UseKestrelHttpsConfiguration();
        WebServing.Configure(builder, start.Settings.Web, start.Certificate);
        AddLogging(builder);
        builder.Services.AddSystemd();
        builder.Services.AddWindowsService(options => options.ServiceName = "LabWatch");
        builder.Services.Configure<HostOptions>(options => options.ShutdownTimeout = ShutdownBudget);
        AddRooms(builder.Services, start);
        more?.Invoke(builder.Services);

        WebApplication app = builder.Build();
        app.MapLabWatchApi();
        app.MapLabWatchPages();
        HostLog.DataIn(app.Logger, start.Data.Path);
        return app;
    }

    // Hosted services start in this order and stop in the reverse one: alerts and stores before the intake that feeds them.
    private static void AddRooms(IServiceCollection services, ServiceStart start)
    {
        services.AddSingleton(start.Clock);
        services.AddSingleton(start.Data);
        services.AddSingleton(start.Settings);
        services.AddSingleton(start.Lab);
        services.AddSingleton<ILabSnapshotSource>(start.Lab);
        services.AddSingleton(new HostNames(WebAddresses.AllowedHosts(WebAddresses.Parse(start.Urls), start.Settings.Web)));
        services.AddSingleton(start.Settings.Access);
        services.AddSingleton(new SetUpFile(Path.Combine(start.Data.Path, "set-up-code")));
        services.AddLabWatchRecords(start.Settings.Records);
        services.AddLabWatchReadings(start.Settings.Readings);
        services.AddLabWatchAlerts(start.Settings.Alerts);
        services.AddSingleton<ILabInForce>(start.Lab);
        services.AddSingleton<LabKeeper>();
        services.AddHostedService(provider => provider.GetRequiredService<LabKeeper>());
        services.AddHostedService<StartRecorder>();
        services.AddLabWatchEvidence();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IDependencyCheck, LabCheck>());
        services.AddLabWatchApi();
        if (start.Certificate is { } certificate)
        {
            services.AddSingleton<IBrokerCertificate>(new BrokerCertificate(certificate));
        }

        services.AddLabWatchIntake(start.Settings.Intake);
        services.AddHostedService<StorageWatch>();
        services.AddHostedService<StateTeller>();
        services.AddLabWatchAssessments(start.Settings.Assessments);
    }

    private static void AddLogging(WebApplicationBuilder builder)
    {
        builder.Logging.AddFilter("Microsoft", LogLevel.Warning);
        builder.Logging.AddFilter("System", LogLevel.Warning);
        builder.Logging.AddFilter("Quartz", LogLevel.Warning);

        // A call without a session is an everyday event, and refused sign-ins stand in the trail.
        builder.Logging.AddFilter("LabWatch.Service.Api.Access.CallerHandler", LogLevel.Warning);

        // Ends of the start and of the stop are worth a line; the framework's address lines are printed in words of our own.
        builder.Logging.AddFilter("Microsoft.Hosting.Lifetime", LogLevel.Warning);
        builder.Logging.AddConfiguration(builder.Configuration.GetSection("Logging"));
        builder.Logging.AddSimpleConsole(options =>
        {
            options.SingleLine = true;
            options.UseUtcTimestamp = true;
            options.TimestampFormat = "yyyy-MM-dd'T'HH:mm:ss'Z' ";
        });
    }
}
