using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A point of the temperature profile of the wall.</summary>
internal sealed record CurvePointView(
    [property: Description("Distance from the aperture plane, millimetres.")] double PositionMillimetre,
    [property: Description("Temperature of the wall, degree Celsius.")] double Celsius);
