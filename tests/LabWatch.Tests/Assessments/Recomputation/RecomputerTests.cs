using LabWatch.Assessments;
using LabWatch.Assessments.Recomputation;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Assessments.Recomputation;

/// <summary>Every criterion's assessments of the simulated furnace, computed again.</summary>
public sealed class RecomputerTests
{
    private static readonly RecomputeRequest All = new(null, [], [], null);

    [Fact]
    public async Task The_same_inputs_give_the_same_bits_in_every_criterion()
    {
        await using PlannerHarness lab = await PlannerOfAllCriteriaTests.AssessedAsync();
        IReadOnlyList<Assessment> recorded = await lab.RecordedAsync();
        List<RecomputedAssessment> again = await RunAsync(lab, All);
        Assert.All(again, item => Assert.Equal((Agreement.Identical, string.Empty), (item.Agreement, item.Difference)));
        Assert.Equal(recorded.Select(item => item.Id).Order(), again.Select(item => item.Standing.Id).Order());
        Assert.Equal(PlannerOfAllCriteriaTests.Criteria.Select(criterion => criterion.Code).Order(), again.Select(item => item.Standing.Criterion).Distinct().Order());
        Assert.Equal(recorded.Count, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task What_another_version_finds_otherwise_is_told_and_recorded_only_where_a_reason_is_given()
    {
        await using PlannerHarness lab = await PlannerOfAllCriteriaTests.AssessedAsync();
        Assessment altered = (await lab.RecordedAsync()).First(item => item.Criterion == "stability" && item.Value.HasValue);
        Assessment wrong = altered with { Revision = 2, Value = altered.Value with { Value = altered.Value.Value * (1 + 1e-8) }, SupersedeReason = "A former version." };
        await lab.Ledger.RecordAsync([wrong], TestContext.Current.CancellationToken);

        RecomputedAssessment told = Assert.Single(await RunAsync(lab, All), item => item.Agreement is not Agreement.Identical);
        Assert.Equal((wrong.Id, Agreement.Differs, null), (told.Standing.Id, told.Agreement, told.Superseding));
        Assert.StartsWith("value ", told.Difference, StringComparison.Ordinal);

        RecomputedAssessment recorded = Assert.Single(await RunAsync(lab, All with { Reason = "A defect was mended" }), item => item.Agreement is not Agreement.Identical);
        Assert.Equal((3, altered.Value), (recorded.Superseding!.Revision, recorded.Superseding.Value));
        Assert.StartsWith("A defect was mended: computed again by version test instead of test: value ", recorded.Superseding.SupersedeReason, StringComparison.Ordinal);
        Assert.All(await RunAsync(lab, All), item => Assert.Equal(Agreement.Identical, item.Agreement));
    }

    [Fact]
    public async Task A_difference_in_the_last_digits_agrees_and_is_not_recorded()
    {
        await using PlannerHarness lab = await PlannerOfAllCriteriaTests.AssessedAsync();
        Assessment altered = (await lab.RecordedAsync()).First(item => item.Criterion == "stability" && item.Value.HasValue);
        await lab.Ledger.RecordAsync([altered with { Revision = 2, Value = altered.Value with { Value = Math.BitIncrement(altered.Value.Value) } }], TestContext.Current.CancellationToken);
        RecomputedAssessment agrees = Assert.Single(await RunAsync(lab, All with { Reason = "Anything" }), item => item.Agreement is not Agreement.Identical);
        Assert.Equal((Agreement.Agrees, null), (agrees.Agreement, agrees.Superseding));
    }

    [Fact]
    public async Task A_corrected_certificate_is_told_as_changed_inputs_and_recording_it_does_what_the_planner_does()
    {
        await using PlannerHarness lab = await PlannerOfAllCriteriaTests.AssessedAsync();
        IReadOnlyList<Assessment> before = await lab.RecordedAsync();
        LabSnapshot demo = PlannerOfAllCriteriaTests.Demo.Value.Lab;
        Certificate former = demo.Certificates.Single(certificate => certificate.Instrument == "prt-201");
        lab.Snapshots.Exchange(PlannerOfAllCriteriaTests.With(certificates: [.. demo.Certificates, former with { Revision = former.Revision + 1 }]));
        List<RecomputedAssessment> changed = [.. (await RunAsync(lab, All with { Reason = "Corrected certificate" })).Where(item => item.Agreement is Agreement.InputsChanged)];
        Assert.NotEmpty(changed);
        Assert.All(changed, item => Assert.StartsWith("Corrected certificate: Certificate ", item.Superseding!.SupersedeReason, StringComparison.Ordinal));

        // Nothing is left for the planner.
        await lab.RunQuietAsync();
        Assert.Equal(before.Count + changed.Count, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task Sources_criteria_and_windows_that_are_not_asked_for_are_left_alone()
    {
        await using PlannerHarness lab = await PlannerOfAllCriteriaTests.AssessedAsync();
        TimeWindow hour = new(PlannerHarness.Start + TimeSpan.FromHours(1), PlannerHarness.Start + TimeSpan.FromHours(2));
        Assert.Empty(await RunAsync(lab, All with { Sources = ["fir"] }));
        List<RecomputedAssessment> some = await RunAsync(lab, All with { Window = hour, Criteria = ["stability"], Sources = ["rowan"] });
        Assert.Equal(6, some.Count);
        Assert.All(some, item => Assert.True(item.Standing.Criterion == "stability" && hour.Contains(item.Standing.Window.End)));
    }

    private static async Task<List<RecomputedAssessment>> RunAsync(PlannerHarness lab, RecomputeRequest request)
    {
        Recomputer recomputer = new(lab.Store, lab.Ledger, PlannerOfAllCriteriaTests.Criteria, new AssessmentsOptions { ProgramVersion = "test" }, lab.Clock);
        return await recomputer.RunAsync(lab.Snapshots.Current, request, TestContext.Current.CancellationToken).ToListAsync(TestContext.Current.CancellationToken);
    }
}
