using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments;

/// <summary>
/// What the planner does for every criterion: the simulated furnace <c>rowan</c> with two bands and two comparators over four hours, judged by all
/// criteria that there are. What changes makes new revisions of exactly what it touched.
/// </summary>
public sealed class PlannerOfAllCriteriaTests
{
    private static readonly Instant From = PlannerHarness.Start;
    private static readonly Instant Until = From + TimeSpan.FromHours(4);
    private static readonly Instant Change = From + TimeSpan.FromHours(2);
    internal static readonly Lazy<(LabSnapshot Lab, IReadOnlyList<Reading> Readings)> Demo = new(Simulate);

    internal static ICriterion[] Criteria { get; } =
    [
        new StabilityCriterion(StabilityCriterion.DefaultSchedule),
        new DataHealthCriterion(DataHealthCriterion.DefaultSchedule),
        new AxialUniformityCriterion(AxialUniformityCriterion.DefaultSchedule, DemoRun.Models),
        new EffectiveEmissivityCriterion(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models),
        new SettledCriterion(SettledCriterion.DefaultSchedule),
        new SurroundingsCriterion(SurroundingsCriterion.DefaultSchedule),
        new TraceabilityCriterion(TraceabilityCriterion.DefaultSchedule),
    ];

    [Fact]
    public async Task Late_readings_supersede_exactly_the_windows_that_use_them_in_every_criterion_and_scope()
    {
        Instant late = From + TimeSpan.FromMinutes(125);
        await using PlannerHarness lab = await AssessedAsync(reading => reading.Time != late);
        IReadOnlyList<Assessment> before = await lab.RecordedAsync();
        lab.Add(Demo.Value.Readings.Where(reading => reading.Time == late));
        await lab.RunQuietAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before.Count)];
        Assert.Equal(Names(before.Where(item => Schedule(item).SpanOf(item.Window).Contains(late))), Names(superseding));
        Assert.Equal(Criteria.Select(criterion => criterion.Code).Order(), superseding.Select(item => item.Criterion).Distinct().Order());
        Assert.All(superseding, item => Assert.Equal(2, item.Revision));
        Assert.All(superseding, item => Assert.StartsWith("Readings came in later, in the hour of", item.SupersedeReason, StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("prt-201", "axial-uniformity", "effective-emissivity", "settled", "stability", "traceability")]
    [InlineData("prt-203", "axial-uniformity", "effective-emissivity", "traceability")]
    public async Task A_corrected_certificate_supersedes_every_criterion_that_rests_on_its_thermometer(string instrument, params string[] expected)
    {
        await using PlannerHarness lab = await AssessedAsync();
        IReadOnlyList<Assessment> before = await lab.RecordedAsync();
        LabSnapshot demo = Demo.Value.Lab;
        Certificate former = demo.Certificates.Single(certificate => certificate.Instrument == instrument);
        lab.Snapshots.Exchange(With(certificates: [.. demo.Certificates, former with { Revision = former.Revision + 1 }]));
        await lab.RunAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before.Count)];
        Assert.Equal(Names(before.Where(item => expected.Contains(item.Criterion))), Names(superseding));
        Assert.All(superseding, item => Assert.StartsWith("Certificate ", item.SupersedeReason, StringComparison.Ordinal));
        lab.Restart();
        await lab.RunAsync();
        Assert.Equal(before.Count + superseding.Length, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task A_new_description_of_the_source_supersedes_from_its_date_on_only_in_every_criterion()
    {
        await using PlannerHarness lab = await AssessedAsync();
        IReadOnlyList<Assessment> before = await lab.RecordedAsync();
        Assert.All(before, item => Assert.Equal("rowan@1", item.Provenance.Source));
        lab.Snapshots.Exchange(With(revised: rowan => rowan with { Name = "Rowan, painted anew" }));
        await lab.RunAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before.Count)];
        Assert.Equal(Names(before.Where(item => item.Window.End >= Change)), Names(superseding));
        Assert.All(superseding, item => Assert.Equal(("rowan@2", "The source is described by rowan@2 instead of rowan@1."), (item.Provenance.Source, item.SupersedeReason)));
    }

    [Fact]
    public async Task A_band_that_the_source_does_not_have_any_more_is_withdrawn_once_and_its_comparator_with_it()
    {
        await using PlannerHarness lab = await AssessedAsync();
        IReadOnlyList<Assessment> before = await lab.RecordedAsync();
        Assert.Contains(before, item => item.Scope == "3-5");
        lab.Snapshots.Exchange(With(revised: rowan => rowan with
        {
            Bands = [.. rowan.Bands.Where(band => band.Id != "3-5")],
            Channels = [.. rowan.Channels.Where(channel => channel.Band != "3-5")],
            Baselines = [.. rowan.Baselines.Where(baseline => baseline.Band != "3-5")],
            Cavity = rowan.Cavity with { Coating = [.. rowan.Cavity.Coating.Where(coating => coating.Band != "3-5")] },
        }));
        await lab.RunAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before.Count)];
        Assert.Equal(Names(before.Where(item => item.Window.End >= Change)), Names(superseding));
        Assessment[] gone = [.. superseding.Where(item => item.Scope is "3-5" or "comparator-3-5")];
        Assert.NotEmpty(gone);
        Assert.All(gone, item => Assert.Equal((Decision.NotDecided, false, 0), (item.Decision, item.Value.HasValue, item.Figures.Count)));
        Assert.Contains(gone, item => item.Explanation == "Not decided: rowan@2, the description that holds for this window, has no 3-5 that this criterion judges.");
        Assert.All(superseding.Except(gone), item => Assert.True(item.Figures.Count > 0));
        lab.Restart();
        await lab.RunQuietAsync();
        Assert.Equal(before.Count + superseding.Length, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task A_limit_for_one_band_supersedes_the_scopes_of_that_band_alone()
    {
        await using PlannerHarness lab = await AssessedAsync();
        IReadOnlyList<Assessment> before = await lab.RecordedAsync();
        AcceptanceLimit tight = new("rowan-new", 1, Key, CriterionCode.EffectiveEmissivity, 1e-9, "/", DecisionRule.SimpleAcceptance, Change) { Band = "3-5" };
        lab.Snapshots.Exchange(With(limits: [.. Demo.Value.Lab.Limits, tight]));
        await lab.RunAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before.Count)];
        Assert.Equal(
            Names(before.Where(item => item.Criterion == CriterionCode.EffectiveEmissivity && item.Scope is "3-5" or "comparator-3-5" && item.Window.End >= Change)), Names(superseding));
        Assert.All(superseding, item => Assert.Equal("rowan-new@1", item.Provenance.Limit));
        lab.Snapshots.Exchange(With(limits: [.. Demo.Value.Lab.Limits, tight with { WithdrawnFrom = From }]));
        await lab.RunAsync();
        Assessment[] back = [.. (await lab.RecordedAsync()).Skip(before.Count + superseding.Length)];
        Assert.Equal(Names(superseding), Names(back));
        Assert.All(back, item => Assert.Equal(3, item.Revision));
    }

    [Fact]
    public async Task A_criterion_with_a_defect_holds_no_other_up()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync(Demo.Value.Lab, [new Defect(), .. Criteria]);
        lab.Add(Demo.Value.Readings.Where(reading => reading.Time < From + TimeSpan.FromHours(1)));
        lab.Clock.AdvanceTo(From + TimeSpan.FromHours(1) + TimeSpan.FromMinutes(1));
        await lab.RunAsync();
        Assert.Equal("broken", lab.State.Current.LastError);
        Assert.Equal(Criteria.Select(criterion => criterion.Code).Order(), (await lab.RecordedAsync()).Select(item => item.Criterion).Distinct().Order());
    }

    private sealed class Defect : ICriterion
    {
        public string Code => CriterionCode.Purge;

        public CriterionSchedule Schedule => StabilityCriterion.DefaultSchedule;

        public IReadOnlyList<string> Channels(ReferenceSource source) => [source.Channels[0].Id];

        public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input) => throw new InvalidOperationException("broken");
    }

    private static SourceKey Key { get; } = new("hollin-vale", "rowan");

    private static CriterionSchedule Schedule(Assessment item) => Criteria.Single(criterion => criterion.Code == item.Criterion).Schedule;

    private static IEnumerable<string> Names(IEnumerable<Assessment> items) =>
        items.Select(item => $"{item.Criterion} {item.Scope} {item.Window.End}").Order(StringComparer.Ordinal);

    internal static async Task<PlannerHarness> AssessedAsync(Func<Reading, bool>? isThere = null)
    {
        PlannerHarness lab = await PlannerHarness.NewAsync(Demo.Value.Lab, Criteria);
        lab.Add(Demo.Value.Readings.Where(isThere ?? (_ => true)));
        lab.Clock.AdvanceTo(Until + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        return lab;
    }

    /// <summary>The demo's lab with something changed.</summary>
    internal static LabSnapshot With(
        IReadOnlyList<Certificate>? certificates = null, IReadOnlyList<AcceptanceLimit>? limits = null, Func<ReferenceSource, ReferenceSource>? revised = null)
    {
        LabSnapshot demo = Demo.Value.Lab;
        ReferenceSource rowan = demo.FindSource(Key)!;
        return new LabSnapshot(
            demo.Site, revised is null ? [rowan] : [revised(rowan) with { Revision = 2, EffectiveFrom = Change }], demo.Instruments, demo.Installations,
            certificates ?? demo.Certificates, limits ?? demo.Limits, [])
        {
            FormerSources = revised is null ? [] : [rowan],
        };
    }

    private static (LabSnapshot Lab, IReadOnlyList<Reading> Readings) Simulate()
    {
        DemoRun run = new(1, From);
        run.RunUntil(Until, "rowan");
        ReferenceSource rowan = run.Source("rowan");
        LabSnapshot lab = new(run.Lab.Site, [rowan], run.Lab.Instruments, run.Lab.Installations, run.Lab.Certificates, run.Lab.Limits, []);
        return (lab, [.. run.Read("rowan", [.. rowan.Channels.Select(channel => channel.Id)], new TimeWindow(From, Until + TimeSpan.FromHours(1))).Series
            .SelectMany(series => Enumerable.Range(0, series.Count)
                .Select(i => new Reading(series.Channel, new Instant(series.TimeMicroseconds.Span[i]), series.Values.Span[i], series.Qualities.Span[i])))]);
    }
}
