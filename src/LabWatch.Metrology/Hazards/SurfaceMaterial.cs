namespace LabWatch.Metrology.Hazards;

/// <summary>Material of a surface that can be touched, in the groups of ISO 13732-1.</summary>
public enum SurfaceMaterial
{
    /// <summary>Not known: the most careful threshold applies.</summary>
    Unknown,

    /// <summary>Bare metal.</summary>
    UncoatedMetal,

    /// <summary>Metal with a coat of paint, lacquer, powder or enamel.</summary>
    CoatedMetal,

    /// <summary>Ceramic, glass or stone.</summary>
    CeramicGlassStone,

    /// <summary>Plastic.</summary>
    Plastic,

    /// <summary>Wood.</summary>
    Wood,
}
