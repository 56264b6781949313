using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Messages;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Hosting;

/// <summary>Hands alerts about the service itself to the desk.</summary>
internal sealed class ServiceAlerts(IConditionSink desk, ILabSnapshotSource lab, TimeProvider clock) : IServiceAlerts
{
    /// <inheritdoc/>
    public void Raise(string code, AlertPriority priority, string headline, string what, string toDo) => Post(code, true, priority, headline, what, toDo);

    /// <inheritdoc/>
    public void Clear(string code, string headline) => Post(code, false, AlertPriority.Low, headline, headline, AlertTexts.ServiceReturnedDo);

    private void Post(string code, bool present, AlertPriority priority, string headline, string what, string toDo)
    {
        LabSite site = lab.Current.Site;
        Instant now = Instant.Now(clock);
        SourceKey key = new(site.Id, ServiceAlertCode.Source);
        string detail = Phrase.Fill(AlertTexts.PlainLayout, what, Phrase.Fill(AlertTexts.WhereService, Environment.MachineName), new SiteTime(site).Write(now), toDo);
        desk.Post(new AlertCondition(
            new AlertKey(key, code, string.Empty), present, now, priority, Phrase.Cut(headline, Phrase.LongestHeadline), detail, null, null, string.Empty));
    }
}
