using LabWatch.Lab.Sources;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Radiometry;

namespace LabWatch.Assessments.Cavities;

/// <summary>All of a source's radiance in one band that does not depend on its temperatures. Immutable.</summary>
/// <param name="Band">The working band.</param>
/// <param name="Radiance">Its blackbody radiance.</param>
/// <param name="Cavity">Geometry and view.</param>
/// <param name="Optics">Optics of the wall, as stated.</param>
/// <param name="Weights">Zone weights for the stated optics; null where there are problems.</param>
/// <param name="Sides">The weights with each uncertain optical property moved both ways.</param>
/// <param name="Problems">Why there is no model, in words; empty where there is one.</param>
public sealed record BandModel(
    WorkingBand Band,
    RadianceBand Radiance,
    CavityDescription Cavity,
    CoatingOptics Optics,
    ZoneWeights? Weights,
    IReadOnlyList<OpticsSide> Sides,
    IReadOnlyList<string> Problems)
{
    /// <summary>Standard uncertainty of the isothermal effective emissivity from the method: Monte Carlo standard error, or the estimated error of the others.</summary>
    public double MethodError => Weights is { } weights ? Math.Max(weights.StandardError, weights.Counts.RelativeError * weights.IsothermalComplement) : double.NaN;

    /// <summary>The method, as a slug: <c>ring-kernels</c>, <c>monte-carlo</c>, or <c>closed-form</c> (<c>flat-plate</c> for a plate).</summary>
    public string Method => Cavity.Geometry.Form == CavityForm.FlatPlate ? "flat-plate" : Weights?.Counts.Method switch
    {
        CavityMethod.IntegralEquation => "ring-kernels",
        CavityMethod.MonteCarlo => "monte-carlo",
        _ => "closed-form",
    };
}
