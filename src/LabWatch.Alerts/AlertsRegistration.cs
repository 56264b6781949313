using LabWatch.Alerts.Assessments;
using LabWatch.Alerts.Attention;
using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.Hosting;
using LabWatch.Alerts.Links;
using LabWatch.Alerts.Mail;
using LabWatch.Alerts.Outbox;
using LabWatch.Alerts.Push;
using LabWatch.Alerts.Recording;
using LabWatch.Lab;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Secrets;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts;

/// <summary>Registers hazard watch, alerts and notifiers.</summary>
public static class AlertsRegistration
{
    private static readonly TimeSpan ConnectTime = TimeSpan.FromSeconds(5);
    private static readonly TimeSpan ConnectionLife = TimeSpan.FromMinutes(2);

    /// <summary>
    /// Adds the alerts: an <see cref="IReadingTap"/> to feed, and the <see cref="IAlertBoard"/>. Needs <see cref="ILabSnapshotSource"/>, the
    /// alert and assessment ledgers, and logging. Calling it again changes nothing.
    /// </summary>
    /// <param name="services">The services.</param>
    /// <param name="options">Settings without findings (see <see cref="AlertsOptions.Validate"/>).</param>
    public static IServiceCollection AddLabWatchAlerts(this IServiceCollection services, AlertsOptions options)
    {
        ArgumentNullException.ThrowIfNull(services);
        ArgumentNullException.ThrowIfNull(options);
        services.TryAddSingleton(TimeProvider.System);
        services.TryAddSingleton(options);
        AddHazards(services);
        AddDesk(services);
        AddNotifiers(services);
        services.TryAddSingleton<AssessmentFollower>();
        services.TryAddSingleton<IAlertBoard, AlertBoard>();
        services.TryAddSingleton<IServiceAlerts>(provider => new ServiceAlerts(
            provider.GetRequiredService<DeskQueue>(), provider.GetRequiredService<ILabSnapshotSource>(), provider.GetRequiredService<TimeProvider>()));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, AlertsService>());
        return services;
    }

    private static void AddHazards(IServiceCollection services)
    {
        services.TryAddSingleton(provider => new LastHeardFile(
            provider.GetRequiredService<AlertsOptions>().DataDirectory, provider.GetRequiredService<ILogger<LastHeardFile>>()));
        services.TryAddSingleton(provider =>
        {
            HazardWatch watch = new(
                provider.GetRequiredService<AlertsOptions>(), provider.GetRequiredService<TimeProvider>(), provider.GetRequiredService<DeskQueue>(),
                provider.GetRequiredService<LastHeardFile>().Read(), provider.GetRequiredService<ILogger<HazardWatch>>());
            watch.Apply(provider.GetRequiredService<ILabSnapshotSource>().Current);
            return watch;
        });
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IReadingTap, HazardWatch>(provider => provider.GetRequiredService<HazardWatch>()));
        services.TryAddSingleton<HazardTicker>();
        services.TryAddSingleton<RunAttention>();
        services.TryAddSingleton<ReadingsWatch>();
        services.TryAddSingleton<Heartbeat>();
    }

    private static void AddDesk(IServiceCollection services)
    {
        services.TryAddSingleton<DeskQueue>();
        services.TryAddSingleton<AlertJournalHandle>();
        services.TryAddSingleton(provider => new SetAsideFile(provider.GetRequiredService<AlertsOptions>().DataDirectory));
        services.TryAddSingleton<LedgerRecorder>();
        services.TryAddSingleton(provider => new DeskReducer(
            provider.GetRequiredService<AlertJournalHandle>().State, () => provider.GetRequiredService<NotifierBook>().Current,
            provider.GetRequiredService<AlertsOptions>().GroupWindow));
        services.TryAddSingleton(provider => new AlertDesk(
            provider.GetRequiredService<DeskQueue>(),
            provider.GetRequiredService<DeskReducer>(),
            new JournalKeeper(provider.GetRequiredService<AlertJournalHandle>().Writer),
            [
                provider.GetRequiredService<MessageDispatcher>(),
                provider.GetRequiredService<LedgerRecorder>(),
                new HazardRestorer(provider.GetRequiredService<HazardWatch>()),
                new AttentionListener(provider.GetRequiredService<HazardWatch>()),
            ],
            provider.GetRequiredService<TimeProvider>(),
            provider.GetRequiredService<ILogger<AlertDesk>>()));
    }

    private static void AddNotifiers(IServiceCollection services)
    {
        services.TryAddSingleton<AlertsMetrics>();
        services.TryAddSingleton(provider => new NamedSecrets(
            provider.GetRequiredService<AlertsOptions>().SecretsDirectory, Environment.GetEnvironmentVariable));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<INotifierChannel, LogChannel>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<INotifierChannel, WebhookChannel>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<INotifierChannel, MailChannel>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<INotifierChannel, PushChannel>());
        services.TryAddSingleton(provider => PushKeys.Open(provider.GetRequiredService<AlertsOptions>().DataDirectory));
        services.TryAddSingleton<PushDesk>();
        services.TryAddSingleton<IPushDesk>(provider => provider.GetRequiredService<PushDesk>());
        services.TryAddSingleton<AlertLinks>();
        services.TryAddSingleton<IAlertLinks>(provider => provider.GetRequiredService<AlertLinks>());
        services.TryAddSingleton<MailWriter>();
        services.TryAddSingleton<NotifierBook>();
        services.TryAddSingleton<ITestMessages, TestMessages>();
        services.TryAddSingleton<MessageSender>();
        services.TryAddSingleton<MessageDispatcher>();

        // The client's own log lines would show addresses, and an address can hold a secret.
        services.AddHttpClient(WebhookChannel.ClientName)
            .ConfigureHttpClient(client => client.Timeout = Timeout.InfiniteTimeSpan)
            .ConfigurePrimaryHttpMessageHandler(() => new SocketsHttpHandler
            {
                AllowAutoRedirect = false,
                UseCookies = false,
                ConnectTimeout = ConnectTime,
                PooledConnectionLifetime = ConnectionLife,
            })
            .RemoveAllLoggers();
    }
}
