using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Records.Contract;

/// <summary>Records of the invented site that the contract tests write and expect back.</summary>
internal static class Sample
{
    public static readonly SourceKey Fir = new("hollin-vale", "fir");

    public static readonly SourceKey Yew = new("hollin-vale", "yew");

    public static readonly Instant Noon = Instant.FromUnixSeconds(1_796_126_400);

    public static TimeWindow Window(int index) => new(Noon + (TimeSpan.FromMinutes(30) * index), Noon + (TimeSpan.FromMinutes(30) * (index + 1)));

    public static Assessment Assessment(SourceKey source, int window, int revision = 1, string criterion = "stability", string scope = "") => new(
        source,
        criterion,
        scope,
        Window(window),
        revision,
        new Estimate(0.1 + window, 1.0 / 3.0, 12.5),
        "mK",
        50.0,
        2.0,
        Decision.ConditionalPass,
        0.987654321,
        [new AssessmentFigure("slope", new Estimate(-1e-3, 2e-4), "K/h"), new AssessmentFigure("nothing", Estimate.None, "K")],
        "Half-range over 30 min is 41 mK (U = 6 mK, k = 2); the limit is 50 mK.",
        new Provenance("ab12", [new SourceHourRead(Noon, 7_000_000_000), new SourceHourRead(Noon + TimeSpan.FromHours(1), 3)], ["prt-1@2"], "fir-stability@1", "0.1.0"),
        Noon + TimeSpan.FromMilliseconds(0.001),
        revision == 1 ? null : "Late readings.");

    public static Alert Alert(SourceKey source, Guid id, Instant raisedAt, AlertState state = AlertState.RaisedUnacknowledged) => new(
        id, source, HazardCode.HotSurface, "case", AlertPriority.High, state, raisedAt, "Case of fir reads 61 degC", "Treat as hot until measured.", 61.2, 48.0, "Cel");

    public static OutboxMessage Message(string id, Guid alert, Instant dueAt) => new(id, alert, "log", "{\"a\":1}", Noon, dueAt, 0, null, null, null);

    public static AlertTransition Raised(Alert alert) => new(alert, 1, alert.RaisedAt, "raised", "labwatch", null);
}
