using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Everything that a page starts with: the first event of the stream.</summary>
internal sealed record SnapshotView(
    [property: Description("The site, and the service's clock.")] SiteView Site,
    [property: Description("The sources with what is known about them.")] IReadOnlyList<SourceView> Sources,
    [property: Description("Alerts that are not over, hazards first, newest first.")] IReadOnlyList<AlertView> OpenAlerts,
    [property: Description("The newest assessment of each source, criterion and scope.")] IReadOnlyList<AssessmentView> Assessments,
    [property: Description("How far the demo's history is; null outside the demo or when it is there.")] DemoProgressView? DemoProgress,
    [property: Description("The caution that goes with every hazard.")] string Caution);
