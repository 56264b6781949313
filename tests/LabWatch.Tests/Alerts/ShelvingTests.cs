using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>Shelving, out of service and latching in the words of IEC 62682 / ANSI/ISA-18.2.</summary>
public sealed class ShelvingTests
{
    private static readonly Instant At = TestSite.Start;

    [Fact]
    public void What_is_shelved_says_until_when_why_and_by_whom_and_stays_open()
    {
        AlertTransition shelved = AlertLifeCycle.Shelve(Raised(), Shelf(60))!;
        Assert.Equal((AlertEvent.Shelved, "tess", AlertState.RaisedUnacknowledged), (shelved.Event, shelved.By, shelved.Alert.State));
        Assert.Equal("Until 2026-12-01T09:00:00Z: compressor is serviced", shelved.Note);
        AlertTransition gone = AlertLifeCycle.OnAbsent(AlertLifeCycle.Acknowledge(shelved, At, "tess", null), At, null)!;
        Assert.Equal(AlertState.ReturnedUnacknowledged, gone.Alert.State);
        Assert.Null(AlertLifeCycle.Acknowledge(gone, At, "uli", null));
        Assert.Equal((AlertEvent.Unshelved, AlertState.Normal), Of(AlertLifeCycle.Unshelve(gone, At, "labwatch", null)));
    }

    [Fact]
    public void What_still_stands_when_its_shelf_ends_needs_a_new_acknowledgement()
    {
        AlertTransition acknowledged = AlertLifeCycle.Acknowledge(Raised(), At, "tess", null)!;
        AlertTransition back = AlertLifeCycle.Unshelve(AlertLifeCycle.Shelve(acknowledged, Shelf(60))!, At, "labwatch", null)!;
        Assert.Equal(AlertState.RaisedUnacknowledged, back.Alert.State);
        Assert.Null(back.Alert.AcknowledgedBy);
    }

    [Fact]
    public void A_hazard_is_never_shelved() => Assert.Null(AlertLifeCycle.Shelve(Raised(HazardCode.HotSurface), Shelf(60)));

    [Fact]
    public void Out_of_service_has_no_end_and_words_of_its_own()
    {
        AlertTransition gone = AlertLifeCycle.Shelve(Raised(), Shelf(null))!;
        Assert.Equal(AlertEvent.OutOfService, gone.Event);
        Assert.Null(AlertLifeCycle.Shelve(gone, Shelf(60)));
        Assert.Equal(AlertEvent.ReturnedToService, AlertLifeCycle.Unshelve(gone, At, "quinn", null)!.Event);
    }

    [Fact]
    public void A_condition_that_becomes_graver_comes_off_its_shelf()
    {
        AlertTransition shelved = AlertLifeCycle.Shelve(Raised(), Shelf(60))!;
        Assert.Null(AlertLifeCycle.Next(shelved, Condition(CriterionCode.Stability, AlertPriority.High))!.Alert.Shelf);
    }

    [Theory]
    [InlineData(HazardCode.OverTemperature, true)]
    [InlineData(HazardCode.CutoutTripped, true)]
    [InlineData(HazardCode.HeaterRunaway, true)]
    [InlineData(HazardCode.Condensation, true)]
    [InlineData(HazardCode.HotSurface, false)]
    [InlineData(HazardCode.HazardSilent, false)]
    public void A_latched_hazard_needs_an_acknowledgement_after_it_has_gone(string code, bool isLatched)
    {
        AlertTransition gone = AlertLifeCycle.OnAbsent(AlertLifeCycle.Acknowledge(Raised(code), At, "tess", null), At, null)!;
        Assert.Equal(isLatched ? AlertState.ReturnedUnacknowledged : AlertState.Normal, gone.Alert.State);
        Assert.Equal(isLatched ? null : "tess", gone.Alert.AcknowledgedBy);
    }

    private static (string, AlertState) Of(AlertTransition? step) => (step!.Event, step.Alert.State);

    private static AlertShelf Shelf(int? minutes) => new("tess", At, minutes is { } time ? At + TimeSpan.FromMinutes(time) : null, "compressor is serviced");

    private static AlertTransition Raised(string code = CriterionCode.Stability) => AlertLifeCycle.Next(null, Condition(code, AlertPriority.Medium))!;

    private static AlertCondition Condition(string code, AlertPriority priority) =>
        new(new AlertKey(TestSite.Rowan, code, "well-1"), true, At, priority, "Headline.", "Detail.", 1, 0.5, "K");
}
