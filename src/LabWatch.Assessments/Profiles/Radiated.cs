namespace LabWatch.Assessments.Profiles;

/// <summary>What leaves the cavity in one band, or by how much an input changes that.</summary>
/// <param name="EffectiveEmissivity">Effective emissivity for the reference temperature.</param>
/// <param name="Isothermal">Isothermal effective emissivity.</param>
/// <param name="Deficit">What the temperature profile takes away from it: isothermal minus effective emissivity.</param>
/// <param name="RadianceKelvin">Radiance temperature with the surroundings.</param>
/// <param name="ReferenceKelvin">Reference temperature.</param>
/// <param name="ReferenceRadiance">Blackbody radiance at the reference temperature.</param>
/// <param name="BackgroundRadiance">Radiance of the surroundings.</param>
public readonly record struct Radiated(
    double EffectiveEmissivity, double Isothermal, double Deficit, double RadianceKelvin, double ReferenceKelvin, double ReferenceRadiance, double BackgroundRadiance)
{
    /// <summary>Radiance temperature minus reference temperature, kelvin.</summary>
    public double OffsetKelvin => RadianceKelvin - ReferenceKelvin;

    /// <summary>The difference of two, times a factor.</summary>
    internal static Radiated Difference(in Radiated high, in Radiated low, double factor) => new(
        (high.EffectiveEmissivity - low.EffectiveEmissivity) * factor,
        (high.Isothermal - low.Isothermal) * factor,
        (high.Deficit - low.Deficit) * factor,
        (high.RadianceKelvin - low.RadianceKelvin) * factor,
        (high.ReferenceKelvin - low.ReferenceKelvin) * factor,
        (high.ReferenceRadiance - low.ReferenceRadiance) * factor,
        (high.BackgroundRadiance - low.BackgroundRadiance) * factor);
}
