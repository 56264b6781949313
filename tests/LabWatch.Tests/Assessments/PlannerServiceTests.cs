using LabWatch.Assessments;
using LabWatch.Assessments.Clock;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Planning;
using LabWatch.Lab;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Assessments;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Assessments;

public sealed class PlannerServiceTests
{
    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task The_service_wakes_the_planner_again_and_again_also_after_the_clock_stepped_back()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        ClockSteps steps = new();
        PlannerService service = new(
            lab.Planner, [new StabilityCriterion(StabilityCriterion.DefaultSchedule)], new AssessmentsOptions(), steps, lab.Clock, NullLogger<PlannerService>.Instance);
        await service.StartAsync(Token);
        await UntilRunAfterAsync(lab, null);
        await UntilRunAfterAsync(lab, lab.State.Current.LastRun);
        lab.Clock.Step(TimeSpan.FromHours(-1));
        steps.Raise(new ClockStep(Instant.Now(lab.Clock), TimeSpan.FromHours(-1), TimeSpan.FromSeconds(10)));
        await UntilRunAfterAsync(lab, lab.State.Current.LastRun);
        await service.StopAsync(Token);
    }

    [Fact]
    public async Task Registered_with_the_rooms_it_needs_it_resolves_and_registering_twice_adds_nothing()
    {
        string directory = Directory.CreateTempSubdirectory("labwatch-assessments-").FullName;
        IServiceCollection services = new ServiceCollection()
            .AddLabWatchRecords(RecordsOptions.InDirectory(directory))
            .AddSingleton<IReadingStore>(new FakeReadingStore())
            .AddSingleton<ILabSnapshotSource>(new FakeSnapshots(TestLab.Snapshot()))
            .AddLabWatchAssessments(new AssessmentsOptions());
        int count = services.Count;
        Assert.Equal(count, services.AddLabWatchAssessments(new AssessmentsOptions()).Count);
        await using (ServiceProvider provider = services.BuildServiceProvider())
        {
            Assert.Equal(5, provider.GetServices<IHostedService>().Count());
            Assert.Same(PlannerStatus.None, provider.GetRequiredService<IPlannerState>().Current);
            string[] codes = [.. provider.GetServices<ICriterion>().Select(criterion => criterion.Code)];
            Assert.Contains("stability", codes);
            Assert.Contains("data-health", codes);
            Assert.Contains("axial-uniformity", codes);
            Assert.Contains("effective-emissivity", codes);
            Assert.Equal(codes.Distinct(), codes);
            Assert.Empty(await provider.GetRequiredService<IAssessmentLedger>().LatestAsync(Token));
        }

        Microsoft.Data.Sqlite.SqliteConnection.ClearAllPools();
        Directory.Delete(directory, recursive: true);
    }

    [Fact]
    public void Options_are_checked_all_at_once() =>
        Assert.Equal(
            ["Assessments:WakeInterval", "Assessments:HourQuiet", "Assessments:Stability:Every", "Assessments:Concurrency"],
            new AssessmentsOptions
            {
                WakeInterval = TimeSpan.Zero,
                HourQuiet = TimeSpan.FromDays(1),
                Concurrency = 0,
                Stability = StabilityCriterion.DefaultSchedule with { Every = TimeSpan.FromHours(1) },
            }.Validate().Select(finding => finding.Where));

    /// <summary>Moves the clock until the planner has run after an instant of the last run; the scheduler's own thread needs a moment after each move.</summary>
    private static async Task UntilRunAfterAsync(PlannerHarness lab, Instant? last)
    {
        using CancellationTokenSource deadline = CancellationTokenSource.CreateLinkedTokenSource(Token);
        deadline.CancelAfter(TimeSpan.FromSeconds(60));
        while (lab.State.Current.LastRun == last)
        {
            lab.Clock.Advance(TimeSpan.FromSeconds(1));
            await Task.Delay(TimeSpan.FromMilliseconds(20), TimeProvider.System, deadline.Token);
        }
    }

    private sealed class ClockSteps : IClockStepSource
    {
        public event EventHandler<ClockStep>? Stepped;

        public void Raise(ClockStep step) => Stepped?.Invoke(this, step);
    }
}
