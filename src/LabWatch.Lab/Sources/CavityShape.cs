namespace LabWatch.Lab.Sources;

/// <summary>Shape of the radiating surface behind the aperture.</summary>
public enum CavityShape
{
    /// <summary>A cylinder with a flat bottom.</summary>
    Cylinder,

    /// <summary>A cylinder whose conical bottom has its apex towards the aperture (re-entrant).</summary>
    CylinderInwardCone,

    /// <summary>A cylinder whose conical bottom has its apex away from the aperture.</summary>
    CylinderOutwardCone,

    /// <summary>A cone whose base is the opening.</summary>
    Cone,

    /// <summary>A sphere with a circular opening.</summary>
    Sphere,

    /// <summary>A flat plate: no cavity effect.</summary>
    FlatPlate,
}
