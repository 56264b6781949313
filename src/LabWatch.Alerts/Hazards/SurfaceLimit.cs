using LabWatch.Lab.Sources;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Alerts.Hazards;

/// <summary>The temperature from which on a touchable surface is called hot.</summary>
/// <param name="Celsius">The limit, degree Celsius.</param>
/// <param name="IsLaboratoryLimit">Whether it is the laboratory's own limit, being lower than the burn threshold.</param>
/// <param name="Material">Material it was taken for.</param>
/// <param name="ContactTime">Contact time it was taken for.</param>
internal readonly record struct SurfaceLimit(double Celsius, bool IsLaboratoryLimit, SurfaceMaterial Material, TimeSpan ContactTime)
{
    private static readonly TimeSpan UnknownContact = TimeSpan.FromMinutes(10);

    /// <summary>The lower of the burn threshold (ISO 13732-1) and the laboratory's own limit.</summary>
    public static SurfaceLimit For(SurfaceContact? contact)
    {
        SurfaceMaterial material = contact?.Material ?? SurfaceMaterial.Unknown;
        double threshold = BurnThreshold.Celsius(material, contact?.ContactTime);
        double limit = BurnThreshold.Celsius(material, contact?.ContactTime, contact?.LaboratoryLimitCelsius);
        return new SurfaceLimit(limit, limit < threshold, material, contact?.ContactTime ?? UnknownContact);
    }
}
