using LabWatch.Assessments.Planning;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Records;

namespace LabWatch.Tests.Assessments;

public sealed class PlannerTests
{
    private static Instant Start => PlannerHarness.Start;

    private static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task A_window_is_assessed_once_when_it_has_ended_and_its_grace_has_passed()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start - TimeSpan.FromMinutes(60), Start + TimeSpan.FromMinutes(10)));
        await lab.RunQuietAsync();
        int before = (await lab.RecordedAsync()).Count;
        Assert.Equal(6, before);
        lab.Clock.AdvanceTo(Start + TimeSpan.FromMinutes(10) + TimeSpan.FromSeconds(29));
        await lab.RunAsync();
        Assert.Equal(before, (await lab.RecordedAsync()).Count);
        lab.Clock.Advance(TimeSpan.FromSeconds(1));
        await lab.RunAsync();
        await lab.RunAsync();
        IReadOnlyList<Assessment> recorded = await lab.RecordedAsync();
        Assert.Equal(before + 1, recorded.Count);
        Assert.Equal(new TimeWindow(Start - TimeSpan.FromMinutes(20), Start + TimeSpan.FromMinutes(10)), recorded[^1].Window);
        Assert.Equal(Decision.Pass, recorded[^1].Decision);
        Assert.Equal(["cal-well@1"], recorded[^1].Provenance.Certificates);
        Assert.Equal("rowan-stability@1", recorded[^1].Provenance.Limit);
        Assert.Equal("test", recorded[^1].Provenance.ProgramVersion);
        Assert.Equal(recorded[^1].Window.End, await lab.WatermarkAsync());
    }

    [Fact]
    public async Task After_a_long_sleep_every_missed_window_is_assessed_once_in_order()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromMinutes(1)));
        await lab.RunAsync();
        lab.Add(TestLab.Run(Start + TimeSpan.FromMinutes(1), Start + TimeSpan.FromHours(7)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(7) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        await AssertEveryWindowOnceAsync(lab, Start + TimeSpan.FromHours(7));
    }

    [Fact]
    public async Task Windows_without_readings_make_no_assessment_but_move_the_watermark()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromMinutes(5)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(6));
        await lab.RunQuietAsync();
        Assert.Equal(3, (await lab.RecordedAsync()).Count);
        Assert.Equal(Start + TimeSpan.FromHours(6), await lab.WatermarkAsync());
    }

    [Fact]
    public async Task Without_any_reading_there_is_no_watermark_and_no_assessment()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        await lab.RunAsync();
        Assert.Empty(await lab.RecordedAsync());
        Assert.Null(await lab.WatermarkAsync());
        Assert.Null(lab.State.Current.LastError);
    }

    [Fact]
    public async Task A_crash_at_any_step_leaves_every_window_assessed_exactly_once()
    {
        (IReadOnlyList<string> expected, int steps) = await RecordedAfterAsync(dieAt: int.MaxValue);
        Assert.Equal(12 + 6, expected.Count);
        Assert.InRange(steps, 20, 80);
        await Parallel.ForAsync(0, steps, Token, async (step, _) => Assert.Equal(expected, (await RecordedAfterAsync(step)).Recorded));
    }

    [Fact]
    public async Task Late_readings_supersede_the_windows_that_they_fall_into_with_the_reason()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        Instant lateFrom = Start + TimeSpan.FromMinutes(125);
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(4)).Where(reading => reading.Channel != TestLab.Well || reading.Time != lateFrom));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(4) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        int before = (await lab.RecordedAsync()).Count;
        lab.Add([new Reading(TestLab.Well, lateFrom, 300.2, ReadingQuality.Late)]);
        await lab.RunAsync();
        Assert.Equal(before, (await lab.RecordedAsync()).Count);
        lab.Clock.Advance(TimeSpan.FromSeconds(61));
        await lab.RunAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before)];
        Assert.Equal(6, superseding.Length);
        Assert.All(superseding, item => Assert.True(lateFrom < item.Window.End && lateFrom >= item.Window.Start - TimeSpan.FromMinutes(30)));
        Assert.All(superseding, item => Assert.Equal(2, item.Revision));
        Assert.All(superseding, item => Assert.Matches(@"^Readings came in later, in the hour of 2026-12-01T15:00:00Z \(revision \d+\)\.$", item.SupersedeReason));
        Assert.Equal(3, superseding.Count(item => item.Decision is Decision.Fail));
        await lab.RunQuietAsync();
        Assert.Equal(before + 6, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task Readings_that_a_window_does_not_use_make_no_new_revision()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(2)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(2) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        int before = (await lab.RecordedAsync()).Count;
        lab.Add([new Reading("heater", Start + TimeSpan.FromMinutes(30), 120)]);
        await lab.RunQuietAsync();
        Assert.Equal(before, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task History_that_is_filled_in_behind_live_readings_is_assessed_without_superseded_revisions()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        Instant live = Start + TimeSpan.FromDays(3);
        lab.Clock.AdvanceTo(live);
        for (Instant hour = Start; hour < live; hour += TimeSpan.FromHours(1))
        {
            lab.Add(TestLab.Run(hour, hour + TimeSpan.FromHours(1)));
            Instant now = Instant.Now(lab.Clock);
            lab.Add(TestLab.Run(now, now + TimeSpan.FromSeconds(20)));
            lab.Clock.Advance(TimeSpan.FromSeconds(20));
            await lab.RunAsync();
        }

        Instant end = Instant.Now(lab.Clock);
        await lab.RunQuietAsync();
        IReadOnlyList<Assessment> recorded = await lab.RecordedAsync();
        Assert.InRange(recorded.Count(item => item.Revision > 1), 0, 6);
        Assert.Equal(
            Ends(Start, end).Where(instant => instant <= Start + TimeSpan.FromDays(3) - TimeSpan.FromHours(1)),
            recorded.Where(item => item.Revision == 1).Select(item => item.Window.End).Order().Where(instant => instant <= Start + TimeSpan.FromDays(3) - TimeSpan.FromHours(1)));
    }

    [Fact]
    public async Task A_corrected_certificate_finds_and_supersedes_what_it_touched_once_also_after_a_restart()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(3)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(3) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        int before = (await lab.RecordedAsync()).Count;
        Certificate corrected = TestLab.IndicatorCertificate with { Revision = 2, MaximumCelsius = 299.9999 };
        lab.Snapshots.Exchange(TestLab.Snapshot([TestLab.IndicatorCertificate, corrected]));
        lab.Restart();
        await lab.RunAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before)];
        Assert.Equal(before, superseding.Length);
        Assert.All(superseding, item => Assert.Equal("Certificate cal-well@2 is in force instead of cal-well@1.", item.SupersedeReason));
        Assert.All(superseding, item => Assert.Equal(Decision.NotDecided, item.Decision));
        lab.Restart();
        await lab.RunAsync();
        Assert.Equal(2 * before, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task A_limit_that_applies_from_a_past_day_supersedes_from_there_on_only()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(3)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(3) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        int before = (await lab.RecordedAsync()).Count;
        Instant from = Start + TimeSpan.FromHours(2);
        lab.Snapshots.Exchange(TestLab.Snapshot(limits: [TestLab.Limit, TestLab.Limit with { Revision = 2, Maximum = 1, EffectiveFrom = from }]));
        await lab.RunAsync();
        Assessment[] superseding = [.. (await lab.RecordedAsync()).Skip(before)];
        Assert.Equal(Ends(from - TimeSpan.FromMinutes(1), Start + TimeSpan.FromHours(3)), superseding.Select(item => item.Window.End).Order());
        Assert.All(superseding, item => Assert.Equal(Decision.Fail, item.Decision));
        Assert.All(superseding, item => Assert.Equal("Limit rowan-stability@2 is in force instead of rowan-stability@1.", item.SupersedeReason));
    }

    [Fact]
    public async Task A_clock_that_steps_back_doubles_nothing_and_holds_nothing_up()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(2)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(2) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        lab.Clock.Step(TimeSpan.FromHours(-1));
        await lab.RunQuietAsync();
        lab.Add(TestLab.Run(Start + TimeSpan.FromHours(2), Start + TimeSpan.FromHours(4)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(4) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        await AssertEveryWindowOnceAsync(lab, Start + TimeSpan.FromHours(4));
    }

    [Fact]
    public async Task Windows_that_a_wrong_clock_passed_over_are_assessed_when_their_readings_come()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromMinutes(5)));
        await lab.RunAsync();
        lab.Clock.Step(TimeSpan.FromHours(5));
        await lab.RunAsync();
        Assert.Equal(Start + TimeSpan.FromHours(5) - TimeSpan.FromMinutes(10), await lab.WatermarkAsync());
        lab.Clock.Step(TimeSpan.FromHours(-5));
        for (Instant until = Start + TimeSpan.FromMinutes(10); until <= Start + TimeSpan.FromHours(2); until += TimeSpan.FromMinutes(10))
        {
            lab.Add(TestLab.Run(until - TimeSpan.FromMinutes(10), until));
            lab.Clock.AdvanceTo(until + TimeSpan.FromSeconds(31));
            await lab.RunAsync();
        }

        IReadOnlyList<Assessment> first = [.. (await lab.RecordedAsync()).Where(item => item.Revision == 1)];
        Assert.Equal(Ends(Start, Start + TimeSpan.FromHours(2)), first.Select(item => item.Window.End).Order().TakeWhile(end => end <= Start + TimeSpan.FromHours(2)));
        Assert.Equal(Start + TimeSpan.FromHours(2), (await lab.RecordedAsync())[^1].Window.End);
    }

    [Fact]
    public async Task Two_planners_at_once_record_each_window_once()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(6)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(6) + TimeSpan.FromMinutes(1));
        Planner one = lab.Planner, other = lab.Restart();
        await Task.WhenAll(one.RunAsync(Token).AsTask(), other.RunAsync(Token).AsTask());
        lab.Clock.Advance(TimeSpan.FromSeconds(61));
        await Task.WhenAll(one.RunAsync(Token).AsTask(), other.RunAsync(Token).AsTask());
        await AssertEveryWindowOnceAsync(lab, Start + TimeSpan.FromHours(6));
    }

    [Fact]
    public async Task A_database_that_is_away_is_shown_and_the_windows_are_assessed_when_it_is_back()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromMinutes(50)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromMinutes(51));
        lab.Ledger.At = step => throw new RecordsUnavailableException("locked");
        await lab.RunAsync();
        Assert.Equal("locked", lab.State.Current.LastError);
        Assert.Null(lab.State.Current.LastSuccess);
        lab.Ledger.At = _ => { };
        await lab.RunQuietAsync();
        Assert.Null(lab.State.Current.LastError);
        Assert.Equal(Instant.Now(lab.Clock), lab.State.Current.LastSuccess);
        Assert.Equal(Ends(Start, Start + TimeSpan.FromMinutes(50)), (await lab.RecordedAsync()).Select(item => item.Window.End).Order().Take(5));
    }

    [Fact]
    public async Task A_store_that_starts_counting_again_is_read_from_the_beginning()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        await lab.Ledger.SetPositionAsync(Planner.ChangesReader, 1_000_000, Token);
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromMinutes(30)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(3));
        await lab.RunQuietAsync();
        Assert.Equal(5, (await lab.RecordedAsync()).Count);
    }

    [Fact]
    public async Task Nothing_new_costs_no_reading_of_the_store()
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(2)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(2) + TimeSpan.FromMinutes(1));
        await lab.RunQuietAsync();
        int reads = lab.Store.Reads;
        lab.Restart();
        await lab.RunQuietAsync();
        Assert.Equal(reads, lab.Store.Reads);
    }

    /// <summary>
    /// What is recorded for an hour of history, a late reading and one more hour, with the process dying at the n-th step (a call to
    /// store or ledger, or the moment after it) and starting again; and the number of steps.
    /// </summary>
    private static async Task<(IReadOnlyList<string> Recorded, int Steps)> RecordedAfterAsync(int dieAt)
    {
        await using PlannerHarness lab = await PlannerHarness.NewAsync();
        Instant late = Start + TimeSpan.FromMinutes(5);
        lab.Add(TestLab.Run(Start, Start + TimeSpan.FromHours(1)).Where(reading => reading.Time != late));
        int steps = 0;
        bool dead = false;
        void Step(string step)
        {
            dead |= Interlocked.Increment(ref steps) > dieAt;
            if (dead)
            {
                throw new InvalidOperationException("The process died at: " + step);
            }
        }

        lab.Ledger.At = Step;
        lab.Store.Before = Step;
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(1) + TimeSpan.FromMinutes(1));
        await LiveAsync(async () => await lab.RunQuietAsync());
        lab.Add([new Reading(TestLab.Well, late, 300)]);
        await LiveAsync(async () => await lab.RunQuietAsync());
        lab.Add(TestLab.Run(Start + TimeSpan.FromHours(1), Start + TimeSpan.FromHours(2)));
        lab.Clock.AdvanceTo(Start + TimeSpan.FromHours(2) + TimeSpan.FromMinutes(1));
        await LiveAsync(async () => await lab.RunQuietAsync());
        IReadOnlyList<Assessment> all = await lab.RecordedAsync();
        return ([.. all.Select(item => $"{item.Window.End} {item.Revision} {item.Value.Value:R} {item.Provenance.ReadingsDigest}").Order(StringComparer.Ordinal)], steps);

        async Task LiveAsync(Func<Task> live)
        {
            try
            {
                await live();
            }
            catch (InvalidOperationException) when (dead)
            {
                // Died outside of a source's work; what follows is the next start.
            }

            if (dead)
            {
                dead = false;
                lab.Restart();
                await lab.RunQuietAsync();
            }
        }
    }

    private static IEnumerable<Instant> Ends(Instant after, Instant upTo)
    {
        for (Instant end = after.Floor(600_000_000) + TimeSpan.FromMinutes(10); end <= upTo; end += TimeSpan.FromMinutes(10))
        {
            yield return end;
        }
    }

    private static async Task AssertEveryWindowOnceAsync(PlannerHarness lab, Instant until)
    {
        IReadOnlyList<Assessment> recorded = await lab.RecordedAsync();
        Assert.All(recorded, item => Assert.Equal(1, item.Revision));
        Assert.Equal(Ends(Start, until), recorded.Select(item => item.Window.End).Order().Where(end => end <= until));
        Assert.Equal(recorded.Count, recorded.Select(item => item.Id).Distinct().Count());
    }
}
