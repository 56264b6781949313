using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>The effective emissivity that a departure is told from.</summary>
internal sealed record BaselineView(
    [property: Description("Effective emissivity.")] double EffectiveEmissivity,
    [property: Description("Expanded uncertainty (k = 2).")] double ExpandedUncertainty,
    [property: Description("Where it comes from, in words.")] string From);
