using LabWatch.Metrology.Radiometry;

namespace LabWatch.Metrology.Cavities;

/// <summary>The radiance that leaves a cavity with a temperature profile, in one band.</summary>
/// <param name="EffectiveEmissivity">Radiance of the cavity's own emission over that of a blackbody at the reference temperature; may exceed one.</param>
/// <param name="Complement">One minus that, to full relative precision.</param>
/// <param name="ReflectedPart">Part of the surroundings' radiance that the cavity reflects: one minus the sum of the weights.</param>
public readonly record struct CavityRadiance(double EffectiveEmissivity, double Complement, double ReflectedPart)
{
    /// <summary>Evaluates a profile. Nothing is allocated.</summary>
    /// <param name="weights">Weights of the zones for the wall emissivity in the band.</param>
    /// <param name="band">The band.</param>
    /// <param name="zoneKelvin">Temperature of each zone, kelvin.</param>
    /// <param name="referenceKelvin">Reference temperature, kelvin.</param>
    public static CavityRadiance Of(ZoneWeights weights, RadianceBand band, ReadOnlySpan<double> zoneKelvin, double referenceKelvin)
    {
        ArgumentNullException.ThrowIfNull(weights);
        ArgumentNullException.ThrowIfNull(band);
        ReadOnlySpan<double> w = weights.Weights;
        if (zoneKelvin.Length != w.Length) throw new ArgumentException("One temperature for each zone is needed.", nameof(zoneKelvin));
        double complement = weights.IsothermalComplement + RadianceDeficit.Sum(w, band, zoneKelvin, referenceKelvin);
        return new CavityRadiance(1 - complement, complement, weights.IsothermalComplement);
    }

    /// <summary>Radiance temperature in the band with surroundings of a temperature, kelvin.</summary>
    /// <param name="band">The band.</param>
    /// <param name="referenceKelvin">Reference temperature, kelvin.</param>
    /// <param name="backgroundKelvin">Radiance temperature of the surroundings, kelvin.</param>
    public double RadianceKelvin(RadianceBand band, double referenceKelvin, double backgroundKelvin)
    {
        ArgumentNullException.ThrowIfNull(band);
        return band.Temperature(EffectiveEmissivity * band.Radiance(referenceKelvin) + ReflectedPart * band.Radiance(backgroundKelvin));
    }
}
