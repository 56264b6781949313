namespace LabWatch.Metrology.Cavities;

/// <summary>The form of a radiating cavity.</summary>
public enum CavityForm
{
    /// <summary>Cylinder with a flat bottom.</summary>
    Cylinder,

    /// <summary>Cylinder with a re-entrant conical bottom: the apex points towards the aperture.</summary>
    CylinderInwardCone,

    /// <summary>Cylinder with a conical bottom whose apex points away from the aperture.</summary>
    CylinderOutwardCone,

    /// <summary>Cone whose base is the plane of the aperture.</summary>
    Cone,

    /// <summary>Sphere with a circular opening.</summary>
    Sphere,

    /// <summary>Flat plate: every ray that leaves it was emitted or reflected once.</summary>
    FlatPlate,
}
