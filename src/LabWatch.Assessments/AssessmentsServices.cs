using LabWatch.Assessments.Attribution;
using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Clock;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Forecasts;
using LabWatch.Assessments.Planning;
using LabWatch.Lab.Findings;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace LabWatch.Assessments;

/// <summary>Registers the assessments.</summary>
public static class AssessmentsServices
{
    /// <summary>
    /// Adds the criteria, the planner and the clock watchdog. Needs a reading store, the records and an <see cref="Lab.ILabSnapshotSource"/>
    /// in the same collection. Calling it again changes nothing. Throws <see cref="ArgumentException"/> where the options have findings.
    /// </summary>
    public static IServiceCollection AddLabWatchAssessments(this IServiceCollection services, AssessmentsOptions options)
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
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, StabilityCriterion>(_ => new StabilityCriterion(options.Stability)));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, DataHealthCriterion>(_ => new DataHealthCriterion(options.DataHealth)));
        services.TryAddSingleton(provider => new CavityTraces(options.TraceDirectory, provider.GetRequiredService<ILogger<CavityTraces>>()));
        services.TryAddSingleton<ICavityModels, CavityModels>();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, CavityWarmUp>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, AxialUniformityCriterion>(
            provider => new AxialUniformityCriterion(options.AxialUniformity, provider.GetRequiredService<ICavityModels>())));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, EffectiveEmissivityCriterion>(
            provider => new EffectiveEmissivityCriterion(options.EffectiveEmissivity, provider.GetRequiredService<ICavityModels>())));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, BudgetCriterion>(
            provider => new BudgetCriterion(options.Budget, provider.GetRequiredService<ICavityModels>())));
        services.TryAddSingleton<AssessmentHistory>();
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, SettledCriterion>(_ => new SettledCriterion(options.Settled)));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, PurgeCriterion>(_ => new PurgeCriterion(options.Purge)));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, SurroundingsCriterion>(_ => new SurroundingsCriterion(options.Surroundings)));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, TraceabilityCriterion>(_ => new TraceabilityCriterion(options.Traceability)));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, HeaterBalanceCriterion>(_ => new HeaterBalanceCriterion(options.HeaterBalance)));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<ICriterion, ReferenceAgreementCriterion>(_ => new ReferenceAgreementCriterion(options.ReferenceAgreement)));
        services.TryAddSingleton<AttributionReader>();
        services.TryAddSingleton<PlannerState>();
        services.TryAddSingleton<IPlannerState>(provider => provider.GetRequiredService<PlannerState>());
        services.TryAddSingleton<Planner>();
        services.TryAddSingleton<Recomputation.Recomputer>();
        services.TryAddSingleton<ClockStepWatchdog>();
        services.TryAddSingleton<IClockStepSource>(provider => provider.GetRequiredService<ClockStepWatchdog>());
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, ClockStepWatchdog>(provider => provider.GetRequiredService<ClockStepWatchdog>()));
        services.TryAddEnumerable(ServiceDescriptor.Singleton<IHostedService, PlannerService>());
        return services;
    }
}
