namespace LabWatch.Metrology.Hazards;

/// <summary>
/// Burn threshold of a hot surface by material and contact time, ISO 13732-1:2006. The standard sets no limits; it covers contact of 0.5 s
/// and more with less than 10 % of the skin. The values here are from memory and could not be confirmed against the standard: they are
/// shown as the threshold in use, and the laboratory's own limit applies wherever it is lower. Nothing here says that a surface may be touched.
/// <para>
/// Careful on purpose: the lower edge of each band; between the contact times of the standard the value of the next longer one, so that a
/// value is never above the standard's curve; the values at 10 s, read from a graph, are not used; coated metal at short contact counts as bare.
/// </para>
/// </summary>
public static class BurnThreshold
{
    /// <summary>Threshold for contact up to 10 minutes, any material, degree Celsius.</summary>
    public const double TenMinutesCelsius = 48;

    /// <summary>Threshold for contact beyond 10 minutes (8 h and longer in the standard), any material, degree Celsius.</summary>
    public const double LongContactCelsius = 43;

    /// <summary>The threshold, degree Celsius.</summary>
    /// <param name="material">Material of the surface.</param>
    /// <param name="contactTime">Longest contact to reckon with; null where unknown, which counts as up to 10 minutes.</param>
    public static double Celsius(SurfaceMaterial material, TimeSpan? contactTime)
    {
        double seconds = contactTime?.TotalSeconds ?? 600;
        return seconds switch
        {
            > 600 => LongContactCelsius,
            > 60 => TenMinutesCelsius,
            > 1 => OneMinute(material),
            _ => OneSecond(material),
        };
    }

    /// <summary>The threshold, or the laboratory's own limit where that is lower, degree Celsius.</summary>
    /// <param name="material">Material of the surface.</param>
    /// <param name="contactTime">Longest contact to reckon with; null where unknown.</param>
    /// <param name="laboratoryLimitCelsius">The laboratory's own limit; null where there is none.</param>
    public static double Celsius(SurfaceMaterial material, TimeSpan? contactTime, double? laboratoryLimitCelsius)
    {
        double threshold = Celsius(material, contactTime);
        return laboratoryLimitCelsius < threshold ? laboratoryLimitCelsius.Value : threshold;
    }

    private static double OneMinute(SurfaceMaterial material) => material switch
    {
        SurfaceMaterial.UncoatedMetal or SurfaceMaterial.CoatedMetal => 51,
        SurfaceMaterial.CeramicGlassStone => 56,
        SurfaceMaterial.Plastic or SurfaceMaterial.Wood => 60,
        _ => TenMinutesCelsius,
    };

    private static double OneSecond(SurfaceMaterial material) => material switch
    {
        SurfaceMaterial.UncoatedMetal or SurfaceMaterial.CoatedMetal => 65,
        SurfaceMaterial.CeramicGlassStone => 80,
        SurfaceMaterial.Plastic => 85,
        SurfaceMaterial.Wood => 110,
        _ => TenMinutesCelsius,
    };
}
