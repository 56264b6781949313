using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using LabWatch.Service.Api.Alerts;

namespace LabWatch.Tests.Api;

public sealed class OpenAlertPageTests
{
    private static readonly SourceKey Fir = new("sample", "fir");
    private static readonly SourceKey Yew = new("sample", "yew");

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(7)]
    [InlineData(500)]
    public void Pages_give_every_open_alert_once_newest_first(int count)
    {
        Alert[] open = [.. Enumerable.Range(0, 7).Select(i => Make(Fir, i / 3))];
        List<Alert> seen = [];
        string? after = null;
        do
        {
            AlertPage page = OpenAlertPage.Of(open, new AlertQuery(null, true, after, count));
            seen.AddRange(page.Items);
            after = page.Next;
        }
        while (after is not null);

        Assert.Equal(open.OrderByDescending(alert => alert.RaisedAt).ThenByDescending(alert => alert.Id), seen);
    }

    [Fact]
    public void A_source_sees_its_own_alerts_only() =>
        Assert.Equal([Yew], OpenAlertPage.Of([Make(Fir, 1), Make(Yew, 2)], new AlertQuery(Yew, true, null, 10)).Items.Select(alert => alert.Source));

    private static Alert Make(SourceKey source, int second) => new(
        Guid.NewGuid(), source, HazardCode.HotSurface, "case", AlertPriority.High, AlertState.RaisedUnacknowledged, Instant.FromUnixSeconds(second), "headline", "detail", 60, 55, "Cel");
}
