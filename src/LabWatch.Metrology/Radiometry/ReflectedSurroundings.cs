namespace LabWatch.Metrology.Radiometry;

/// <summary>
/// Radiance temperature of an isothermal surface or cavity that emits with an (effective) emissivity and reflects blackbody surroundings:
/// L = e L(T) + (1 - e) L(T_bg), in one band; its derivatives, and the way back. Exact, not first order. Temperatures in kelvin.
/// </summary>
public static class ReflectedSurroundings
{
    /// <summary>The radiance temperature that a thermometer in the band sees.</summary>
    /// <param name="band">Spectral band.</param>
    /// <param name="kelvin">Temperature of the surface.</param>
    /// <param name="emissivity">Emissivity in the band, 0 to 1.</param>
    /// <param name="backgroundKelvin">Temperature of the surroundings; 0 for none.</param>
    public static RadianceTemperature Evaluate(RadianceBand band, double kelvin, double emissivity, double backgroundKelvin)
    {
        ArgumentNullException.ThrowIfNull(band);
        double own = band.Radiance(kelvin);
        double background = backgroundKelvin > 0 ? band.Radiance(backgroundKelvin) : 0;
        double seen = band.Temperature((emissivity * own) + ((1 - emissivity) * background));
        double slope = band.RadianceSlope(seen);
        return new(
            seen,
            emissivity * band.RadianceSlope(kelvin) / slope,
            (own - background) / slope,
            backgroundKelvin > 0 ? (1 - emissivity) * band.RadianceSlope(backgroundKelvin) / slope : 0);
    }

    /// <summary>
    /// The temperature of the surface from the radiance temperature seen, kelvin; NaN where the surroundings alone would give more radiance.
    /// </summary>
    /// <param name="band">Spectral band.</param>
    /// <param name="radianceKelvin">Radiance temperature seen.</param>
    /// <param name="emissivity">Emissivity in the band, above 0, to 1.</param>
    /// <param name="backgroundKelvin">Temperature of the surroundings; 0 for none.</param>
    public static double SurfaceTemperature(RadianceBand band, double radianceKelvin, double emissivity, double backgroundKelvin)
    {
        ArgumentNullException.ThrowIfNull(band);
        double background = backgroundKelvin > 0 ? band.Radiance(backgroundKelvin) : 0;
        return band.Temperature((band.Radiance(radianceKelvin) - ((1 - emissivity) * background)) / emissivity);
    }

    /// <summary>
    /// The effective emissivity that explains a radiance temperature seen: (L(T_rad) - L(T_bg)) / (L(T) - L(T_bg)). Meaningless near the
    /// temperature of the surroundings, where its sensitivities grow without bound.
    /// </summary>
    public static double EffectiveEmissivity(RadianceBand band, double radianceKelvin, double kelvin, double backgroundKelvin)
    {
        ArgumentNullException.ThrowIfNull(band);
        double background = backgroundKelvin > 0 ? band.Radiance(backgroundKelvin) : 0;
        return (band.Radiance(radianceKelvin) - background) / (band.Radiance(kelvin) - background);
    }
}
