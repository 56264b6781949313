using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>All sources of the site.</summary>
internal sealed record SourceListView(
    [property: Description("The site, and the service's clock.")] SiteView Site,
    [property: Description("The sources, in the order of the lab file.")] IReadOnlyList<SourceView> Sources);
