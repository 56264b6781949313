namespace LabWatch.Metrology.Cavities;

/// <summary>Which surfaces of a cavity have a coating of their own.</summary>
[Flags]
public enum SecondMaterial
{
    /// <summary>None: one material everywhere.</summary>
    None = 0,

    /// <summary>The bottom.</summary>
    Bottom = 1,

    /// <summary>The inner face of the aperture plate.</summary>
    Plate = 2,
}
