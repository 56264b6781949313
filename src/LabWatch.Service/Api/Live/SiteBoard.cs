using System.Reflection;
using LabWatch.Alerts;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Demo;
using LabWatch.Service.Api.Views;
using LabWatch.Simulator.Demo;

namespace LabWatch.Service.Api.Live;

/// <summary>Everything that a page shows of the site now, put together from the rooms that know it.</summary>
internal sealed class SiteBoard(
    ILabSnapshotSource lab, SourceStatusMaker statuses, IAlertBoard alerts, LatestAssessments assessments, TimeProvider clock, IDemoProgress? demo = null)
{
    /// <summary>The caution that goes with every hazard.</summary>
    public const string Caution =
        "LabWatch is no protective device: independent over-temperature protection, guards, gas alarms, ventilation, eye protection against optical "
        + "radiation and local rules (IEC 61010-1, IEC 61010-2-010, IEC 61010-2-011, ICNIRP 2013, local codes) remain in force, and licensed or competent people decide.";

    /// <summary>Version of the program.</summary>
    public static string Version { get; } =
        typeof(SiteBoard).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion.Split('+')[0] ?? "0";

    /// <summary>The site in force.</summary>
    public LabSnapshot Lab => lab.Current;

    /// <summary>How far the demo's history is; null outside the demo or when it is there.</summary>
    public DemoProgressView? Progress => demo is null ? null : DemoProgress.Of(demo.Current);

    /// <summary>The site, and the service's clock.</summary>
    public SiteView Site()
    {
        LabSite site = lab.Current.Site;
        return new SiteView(site.Id, site.Name, site.TimeZone, Instant.Now(clock), Version, demo is not null);
    }

    /// <summary>Alerts that are not over.</summary>
    public IReadOnlyList<Alert> OpenAlerts() => alerts.View().Open;

    /// <summary>The status of one source.</summary>
    public ValueTask<SourceStatusView> StatusAsync(ReferenceSource source, IReadOnlyList<Alert> open, CancellationToken cancellationToken) =>
        statuses.MakeAsync(lab.Current, source, open, cancellationToken);

    /// <summary>All sources.</summary>
    public async ValueTask<IReadOnlyList<SourceView>> SourcesAsync(CancellationToken cancellationToken)
    {
        LabSnapshot current = lab.Current;
        IReadOnlyList<Alert> open = alerts.View().Open;
        List<SourceView> views = [];
        foreach (ReferenceSource source in current.Sources)
        {
            views.Add(SourceViews.Of(source, await statuses.MakeAsync(current, source, open, cancellationToken).ConfigureAwait(false)));
        }

        return views;
    }

    /// <summary>The newest assessment of each source, criterion and scope.</summary>
    public async ValueTask<IReadOnlyList<AssessmentView>> AssessmentsAsync(CancellationToken cancellationToken) =>
        [.. (await assessments.ReadAsync(cancellationToken).ConfigureAwait(false)).Select(AssessmentViews.Of)];

    /// <summary>Everything at once.</summary>
    public async ValueTask<SnapshotView> SnapshotAsync(CancellationToken cancellationToken) => new(
        Site(),
        await SourcesAsync(cancellationToken).ConfigureAwait(false),
        AlertViews.Sorted(lab.Current, alerts.View().Open),
        await AssessmentsAsync(cancellationToken).ConfigureAwait(false),
        Progress,
        Caution);
}
