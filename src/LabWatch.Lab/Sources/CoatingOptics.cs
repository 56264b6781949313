using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Sources;

/// <summary>Optical properties of a cavity's wall in one working band.</summary>
/// <param name="Band">Id of the working band.</param>
/// <param name="Emissivity">Hemispherical emissivity of the coating, 0 to 1.</param>
/// <param name="DiffuseFraction">Diffuse part of the reflection, 0 (mirror) to 1 (Lambert).</param>
public sealed record CoatingOptics(string Band, Estimate Emissivity, Estimate DiffuseFraction)
{
    /// <summary>Hemispherical emissivity of the second material, 0 to 1; null where there is none.</summary>
    public Estimate? SecondEmissivity { get; init; }
}
