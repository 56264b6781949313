using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A value with its expanded uncertainty.</summary>
internal sealed record EstimateView(
    [property: Description("The value.")] double Value,
    [property: Description("Expanded uncertainty, in the unit of the value.")] double ExpandedUncertainty,
    [property: Description("Coverage factor of the expanded uncertainty (95.45 %).")] double CoverageFactor);
