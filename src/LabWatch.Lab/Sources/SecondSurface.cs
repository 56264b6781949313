namespace LabWatch.Lab.Sources;

/// <summary>Surfaces of a cavity that have an emissivity of their own.</summary>
public enum SecondSurface
{
    /// <summary>None: one material everywhere.</summary>
    None,

    /// <summary>The bottom.</summary>
    Bottom,

    /// <summary>The inner face of the aperture plate.</summary>
    AperturePlate,

    /// <summary>Both.</summary>
    BottomAndAperturePlate,
}
