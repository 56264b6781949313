using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>The reference temperature of a source.</summary>
internal sealed record ProfileReferenceView(
    [property: Description("t90, degree Celsius.")] double Celsius,
    [property: Description("Expanded uncertainty, kelvin.")] double ExpandedUncertaintyKelvin,
    [property: Description("Coverage factor of the expanded uncertainty.")] double CoverageFactor);
