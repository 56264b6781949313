using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Joint attributions.</summary>
internal sealed record AttributionListView(
    [property: Description("One finding for each group of sources that share a comparator; empty where none is shared.")] IReadOnlyList<AttributionFindingView> Items);
