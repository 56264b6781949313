namespace LabWatch.Metrology.Cavities;

/// <summary>The parts of a cavity's inner wall.</summary>
public enum CavitySurface
{
    /// <summary>Flat or conical bottom; the whole wall of a plain cone or sphere; the face of a flat plate.</summary>
    Bottom,

    /// <summary>Cylindrical wall.</summary>
    Wall,

    /// <summary>Inner face of the aperture plate.</summary>
    Plate,
}
