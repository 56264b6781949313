using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The axial temperature profile of a source and what it radiates.</summary>
internal sealed record ProfileView(
    [property: Description("The source as site.source.")] string Source,
    [property: Description("The instant that it is given for.")] Instant At,
    [property: Description("Set point, degree Celsius; null where unknown.")] double? SetPointCelsius,
    [property: Description("The reference temperature; null where nothing gives it.")] ProfileReferenceView? Reference,
    [property: Description("Every thermometer along the axis, the lip and the outer case.")] IReadOnlyList<ProfilePointView> Points,
    [property: Description("Temperature of the wall from the aperture to the bottom.")] IReadOnlyList<CurvePointView> Curve,
    [property: Description("What it radiates in each band; empty where no reference temperature is known.")] IReadOnlyList<BandProfileView> Bands,
    [property: Description("What was assumed, left out or is missing, as sentences.")] IReadOnlyList<string> Notes);
