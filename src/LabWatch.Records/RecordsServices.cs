using LabWatch.Lab.Findings;
using LabWatch.Records.Accounts;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using LabWatch.Records.Audit;
using LabWatch.Records.LabFiles;
using LabWatch.Records.Revisions;
using LabWatch.Records.Runs;
using LabWatch.Records.Storage;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;

namespace LabWatch.Records;

/// <summary>Registers the records.</summary>
public static class RecordsServices
{
    /// <summary>
    /// Adds the ledgers on one records database. Calling it again changes nothing. Throws <see cref="ArgumentException"/> where the options
    /// have findings: validate them first and show those.
    /// </summary>
    public static IServiceCollection AddLabWatchRecords(this IServiceCollection services, RecordsOptions options)
    {
        ArgumentNullException.ThrowIfNull(services);
        ArgumentNullException.ThrowIfNull(options);
        IReadOnlyList<Finding> findings = options.Validate();
        if (findings.Count > 0)
        {
            throw new ArgumentException(string.Join(Environment.NewLine, findings), nameof(options));
        }

        services.AddLogging();
        services.TryAddSingleton(TimeProvider.System);
        services.TryAddSingleton(options);
        services.TryAddSingleton<RecordsContexts>();
        services.TryAddSingleton<RecordsMigrator>();
        services.TryAddSingleton<TrailBeginning>();
        services.TryAddSingleton<TrailHeads>();
        services.TryAddSingleton<RecordsDatabase>();
        services.TryAddSingleton<IPositionLedger, PositionLedger>();
        services.TryAddSingleton<IAuditLedger, AuditLedger>();
        services.TryAddSingleton<IAssessmentLedger, AssessmentLedger>();
        services.TryAddSingleton<IAlertLedger, AlertLedger>();
        services.TryAddSingleton<ILabImportLedger, LabImportLedger>();
        services.TryAddSingleton<ILabRecords, LabRecords>();
        services.TryAddSingleton<IRunLedger, RunLedger>();
        services.TryAddSingleton<IAccountLedger, AccountLedger>();
        services.TryAddSingleton<ISessionLedger, SessionLedger>();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, RecordsStartup>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, TrailHeadKeeper>());
        return services;
    }
}
