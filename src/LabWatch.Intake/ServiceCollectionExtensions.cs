using LabWatch.Intake.Accounts;
using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Intake.Brokers.External;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Options;
using LabWatch.Intake.Outgoing;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Intake.Pipeline;
using LabWatch.Intake.Spool;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Secrets;
using LabWatch.Readings;
using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Intake;

/// <summary>Registers the intake.</summary>
public static class ServiceCollectionExtensions
{
    /// <summary>
    /// Adds the intake: the brokers that the options name, one pipeline, <see cref="IIntakeState"/> and <see cref="IStateBoard"/>. It
    /// needs <see cref="ILabSnapshotSource"/>, <see cref="IReadingStore"/> and <see cref="IQuarantine"/>, and feeds every
    /// <see cref="IReadingTap"/> that is registered. A repeated call adds nothing. Throws <see cref="ArgumentException"/> for options
    /// with findings: check <see cref="IntakeOptions.Validate"/> first.
    /// </summary>
    public static IServiceCollection AddLabWatchIntake(this IServiceCollection services, IntakeOptions options)
    {
        ArgumentNullException.ThrowIfNull(services);
        ArgumentNullException.ThrowIfNull(options);
        IReadOnlyList<Finding> findings = options.Validate();
        if (findings.Count > 0)
        {
            throw new ArgumentException(string.Join(Environment.NewLine, findings), nameof(options));
        }

        if (services.Any(service => service.ServiceType == typeof(IntakeService)))
        {
            return services;
        }

        services.TryAddSingleton(TimeProvider.System);
        services.AddSingleton<StateBoard>();
        services.AddSingleton<ServiceState>();
        services.AddSingleton<IStateBoard>(provider => provider.GetRequiredService<StateBoard>());
        services.AddSingleton(options);
        services.AddSingleton<IntakeCounters>();
        services.AddSingleton<CommitSignal>();
        services.AddSingleton<LinkStatus>();
        services.AddSingleton(new CommitterOptions { StoreDeadline = options.StoreDeadline });
        services.AddSingleton(_ => new IntakeQueue(options.QueueLimit, options.QueueLimitBytes));
        services.AddSingleton(_ => new IntakeSpool(options.SpoolDirectory, options.SpoolLimitBytes, options.SpoolFileBytes));
        services.AddSingleton(_ => new MappingTable(options.Mappings));
        services.AddSingleton(provider => new PayloadDecoder(
            provider.GetRequiredService<ILabSnapshotSource>(), options.Root, options.Payload, options.Times, provider.GetRequiredService<MappingTable>()));
        services.AddSingleton(provider => new StoreLane(
            provider.GetRequiredService<IReadingStore>(), provider.GetRequiredService<IQuarantine>(), options.Root, provider.GetRequiredService<IntakeCounters>()));
        services.AddSingleton(provider => ActivatorUtilities.CreateInstance<MessageIntake>(provider, options.Times));
        services.AddSingleton<SpoolDrain>();
        services.AddSingleton<Committer>();
        AddBrokers(services, options);
        services.AddSingleton<IIntakeState>(provider => ActivatorUtilities.CreateInstance<IntakeState>(provider));
        services.AddSingleton<IntakeService>();
        services.AddSingleton<IHostedService>(provider => provider.GetRequiredService<IntakeService>());
        return services;
    }

    private static void AddBrokers(IServiceCollection services, IntakeOptions options)
    {
        if (options.DeviceAccountsFile is { } accounts)
        {
            services.AddSingleton(_ => new DeviceAccountFile(accounts));
            services.AddSingleton<IDeviceAccounts>(provider => provider.GetRequiredService<DeviceAccountFile>());
        }

        if (options.EmbeddedBroker is { } embedded)
        {
            services.AddSingleton(provider => new EmbeddedBroker(
                embedded,
                Path.Combine(options.SpoolDirectory, "retained.json"),
                new DeviceDoor(
                    options.OutRoot, embedded.RequireAccounts, provider.GetService<DeviceAccountFile>(), options.Root, provider.GetRequiredService<MappingTable>(), provider.GetRequiredService<ILabSnapshotSource>()),
                provider.GetRequiredService<StateBoard>(),
                provider.GetRequiredService<ServiceState>(),
                provider.GetService<IBrokerCertificate>(),
                provider.GetRequiredService<MessageIntake>(),
                provider.GetRequiredService<IntakeQueue>(),
                provider.GetRequiredService<IntakeCounters>(),
                provider.GetRequiredService<TimeProvider>(),
                provider.GetRequiredService<ILogger<EmbeddedBroker>>()));
        }

        if (options.ExternalBroker is { } external)
        {
            services.AddSingleton(provider => new BrokerSupervisor(
                external,
                BrokerIdentity.Of(options),
                new NamedSecrets(options.SecretsDirectory, Environment.GetEnvironmentVariable),
                provider.GetRequiredService<StateBoard>(),
                provider.GetRequiredService<ServiceState>(),
                provider.GetRequiredService<MessageIntake>(),
                provider.GetRequiredService<IntakeQueue>(),
                provider.GetRequiredService<CommitSignal>(),
                provider.GetRequiredService<LinkStatus>(),
                provider.GetRequiredService<IntakeCounters>(),
                provider.GetRequiredService<TimeProvider>(),
                provider.GetRequiredService<ILogger<BrokerSupervisor>>()));
        }
    }
}
