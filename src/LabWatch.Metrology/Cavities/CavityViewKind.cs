namespace LabWatch.Metrology.Cavities;

/// <summary>How a detector looks at a cavity.</summary>
public enum CavityViewKind
{
    /// <summary>Along the axis only: the centre of the bottom, or the limit at the apex of a cone.</summary>
    Axis,

    /// <summary>A collimated beam along the axis, uniform over a disk.</summary>
    Beam,

    /// <summary>A point detector on the axis in front of the aperture, which sees a spot in the aperture plane; weight cos(theta) per solid angle.</summary>
    Cone,

    /// <summary>All radiation that leaves the aperture.</summary>
    Hemispherical,

    /// <summary>The local value of one place on the wall of the cylinder (of the cone, where the cavity is one), seen diffusely.</summary>
    Wall,
}
