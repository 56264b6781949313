using FsCheck.Xunit;
using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Assessments;

public sealed class CriterionScheduleTests
{
    private static readonly CriterionSchedule Schedule = StabilityCriterion.DefaultSchedule;

    [Fact]
    public void Windows_end_at_multiples_of_the_step_since_the_epoch_and_are_due_after_their_grace()
    {
        Assert.Equal(TestLab.Noon, Schedule.LastDue(TestLab.Noon + TimeSpan.FromSeconds(30)));
        Assert.Equal(TestLab.Noon - TimeSpan.FromMinutes(10), Schedule.LastDue(TestLab.Noon + TimeSpan.FromSeconds(29)));
        Assert.Equal(
            [TestLab.Noon + TimeSpan.FromMinutes(10), TestLab.Noon + TimeSpan.FromMinutes(20)],
            Schedule.Ending(TestLab.Noon, TestLab.Noon + TimeSpan.FromMinutes(29)).Select(window => window.End));
    }

    [Property]
    public bool An_hour_touches_exactly_the_windows_whose_span_overlaps_it(int hours)
    {
        Instant hour = TestLab.Noon + TimeSpan.FromHours(hours % 100_000);
        Instant hourEnd = hour + TimeSpan.FromHours(1);
        IEnumerable<TimeWindow> expected = Schedule.Ending(hour - TimeSpan.FromHours(3), hour + TimeSpan.FromHours(5))
            .Where(window => Schedule.SpanOf(window).Start < hourEnd && window.End > hour);
        return Schedule.Touching(hour).SequenceEqual(expected);
    }
}
