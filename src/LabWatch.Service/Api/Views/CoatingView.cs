using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Optical properties of a cavity's wall in one working band.</summary>
internal sealed record CoatingView(
    [property: Description("Id of the working band.")] string Band,
    [property: Description("Hemispherical emissivity of the coating, 0 to 1.")] double Emissivity,
    [property: Description("Its standard uncertainty; null where unknown.")] double? EmissivityStandardUncertainty,
    [property: Description("Diffuse part of the reflection, 0 (mirror) to 1 (Lambert).")] double DiffuseFraction,
    [property: Description("Its standard uncertainty; null where unknown.")] double? DiffuseFractionStandardUncertainty,
    [property: Description("Hemispherical emissivity of the second material; null where there is none.")] double? SecondEmissivity,
    [property: Description("Its standard uncertainty; null where unknown.")] double? SecondEmissivityStandardUncertainty);
