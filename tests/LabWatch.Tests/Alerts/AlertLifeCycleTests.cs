using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>
/// The life cycle of IEC 62682 / ANSI/ISA-18.2 (alarm state transition diagram, here without shelving and suppression): raised and
/// returned, each unacknowledged or acknowledged; over only when returned and acknowledged.
/// </summary>
public sealed class AlertLifeCycleTests
{
    private static readonly Instant At = TestSite.Start;

    [Fact]
    public void Raised_acknowledged_returned_is_over()
    {
        AlertTransition last = Steps("raise", "acknowledge", "return")[^1];
        Assert.Equal((AlertState.Normal, 3, AlertEvent.Returned), (last.Alert.State, last.Sequence, last.Event));
        Assert.Equal("A. Person", last.Alert.AcknowledgedBy);
        Assert.NotNull(last.Alert.ReturnedAt);
    }

    [Fact]
    public void Raised_returned_acknowledged_is_over()
    {
        List<AlertTransition> steps = Steps("raise", "return", "acknowledge");
        Assert.Equal(AlertState.ReturnedUnacknowledged, steps[1].Alert.State);
        Assert.Equal(AlertState.Normal, steps[2].Alert.State);
    }

    [Fact]
    public void A_condition_that_comes_back_before_the_acknowledgement_keeps_its_alert()
    {
        List<AlertTransition> steps = Steps("raise", "return", "raise");
        Assert.Equal(AlertEvent.RaisedAgain, steps[2].Event);
        Assert.Equal(steps[0].Alert.Id, steps[2].Alert.Id);
        Assert.Null(steps[2].Alert.ReturnedAt);
    }

    [Theory]
    [InlineData("raise", "raise")]
    [InlineData("raise", "acknowledge", "acknowledge")]
    [InlineData("raise", "return", "return")]
    [InlineData("raise", "acknowledge", "raise")]
    [InlineData("raise", "acknowledge", "return", "acknowledge")]
    [InlineData("raise", "acknowledge", "return", "return")]
    public void Repeating_a_step_changes_nothing(params string[] acts) => Assert.Equal(acts.Length - 1, Steps(acts).Count);

    [Fact]
    public void A_new_occurrence_after_the_end_is_a_new_alert()
    {
        List<AlertTransition> steps = Steps("raise", "acknowledge", "return", "raise");
        Assert.NotEqual(steps[2].Alert.Id, steps[3].Alert.Id);
        Assert.Equal((1, AlertEvent.Raised), (steps[3].Sequence, steps[3].Event));
    }

    [Fact]
    public void A_graver_condition_raises_again_and_needs_a_new_acknowledgement()
    {
        List<AlertTransition> steps = Steps("raise-low", "acknowledge", "raise");
        Assert.Equal((AlertState.RaisedUnacknowledged, AlertPriority.High, AlertEvent.RaisedAgain), (steps[2].Alert.State, steps[2].Alert.Priority, steps[2].Event));
        Assert.Null(steps[2].Alert.AcknowledgedBy);
        Assert.Equal(2, Steps("raise", "acknowledge", "raise-low").Count);
    }

    [Fact]
    public void Nothing_returns_that_was_not_raised() => Assert.Empty(Steps("return"));

    private static List<AlertTransition> Steps(params string[] acts)
    {
        List<AlertTransition> steps = [];
        foreach (string act in acts)
        {
            AlertTransition? last = steps.Count == 0 ? null : steps[^1];
            AlertTransition? next = act switch
            {
                "acknowledge" => AlertLifeCycle.Acknowledge(last!, At, "A. Person", "seen"),
                "return" => AlertLifeCycle.Next(last, Condition(false, AlertPriority.High)),
                _ => AlertLifeCycle.Next(last, Condition(true, act == "raise-low" ? AlertPriority.Low : AlertPriority.High)),
            };
            if (next is not null)
            {
                steps.Add(next);
            }
        }

        return steps;
    }

    private static AlertCondition Condition(bool present, AlertPriority priority) => new(
        new AlertKey(TestSite.Rowan, HazardCode.HotSurface, "case"), present, At, priority, "headline", "detail", 60, 48, "Cel");
}
