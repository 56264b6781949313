using LabWatch.Alerts;
using LabWatch.Alerts.Links;
using LabWatch.Alerts.Push;
using LabWatch.Assessments;
using LabWatch.Assessments.Attribution;
using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Forecasts;
using LabWatch.Assessments.Planning;
using LabWatch.Intake.Accounts;
using LabWatch.Intake.Diagnostics;
using LabWatch.Lab;
using LabWatch.Readings;
using LabWatch.Records.Accounts;
using LabWatch.Records.Alerts;
using LabWatch.Records.Assessments;
using LabWatch.Records.Audit;
using LabWatch.Records.Runs;
using LabWatch.Service.Api;
using LabWatch.Service.Api.Access;
using LabWatch.Simulator;
using LabWatch.Simulator.Demo;
using LabWatch.Tests.Assessments.Cavities;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>The rooms behind the API, all in memory.</summary>
internal sealed class ApiServices(TimeProvider clock)
{
    public SampleLab Lab { get; } = new();

    public FakeReadingStore Store { get; } = new();

    public FakeAlerts Alerts { get; } = new(clock);

    public FakeNotifying Notifying { get; } = new(clock);

    public FakeAssessments Assessments { get; } = new();

    public FakeTrail Trail { get; } = new();

    public FakePlanner Planner { get; } = new();

    public FakeDemo Demo { get; } = new(clock);

    public FakeIntake Intake { get; } = new();

    public TestCallers Callers { get; } = new();

    public void AddTo(IServiceCollection services, bool isDemo)
    {
        services.AddSingleton(clock);
        services.TryAddSingleton<ILabSnapshotSource>(Lab);
        services.AddSingleton<IReadingStore>(Store);
        services.AddSingleton<IReadingStoreHealth>(Store);
        services.AddSingleton<IAlertBoard>(Alerts);
        services.AddSingleton<IAlertLedger>(Alerts);
        services.AddSingleton<ITestMessages>(Notifying);
        services.AddSingleton<IPushDesk>(Notifying);
        services.AddSingleton<IAlertLinks>(Notifying);
        services.AddSingleton<IAssessmentLedger>(Assessments);
        services.AddSingleton<IAuditLedger>(Trail);
        services.AddSingleton<IPlannerState>(Planner);
        services.AddSingleton<ICriterion>(new StabilityCriterion(StabilityCriterion.DefaultSchedule));
        services.AddSingleton<ICavityModels>(DemoRun.Models);
        services.AddSingleton<AssessmentHistory>();
        services.AddSingleton<AttributionReader>();
        services.AddSingleton<IIntakeState>(Intake);
        services.AddSingleton<IDeviceAccounts>(new DeviceAccountFile(Path.Combine(Path.GetTempPath(), $"labwatch-devices-{Guid.NewGuid():N}.json")));
        services.TryAddSingleton<IRunLedger, NoRuns>();
        if (isDemo)
        {
            services.AddSingleton<ILabSimulation>(Demo);
            services.AddSingleton<IDemoProgress>(Demo);
        }

        services.TryAddSingleton<ICallers>(Callers);
        services.TryAddSingleton<IAccountLedger, NoPeople>();
        services.TryAddSingleton<ISessionLedger, NoPeople>();
        services.TryAddSingleton(new SessionClock(clock));
        services.AddLabWatchApi();
    }
}
