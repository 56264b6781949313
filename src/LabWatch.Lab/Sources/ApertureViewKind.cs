namespace LabWatch.Lab.Sources;

/// <summary>How a source is looked at.</summary>
public enum ApertureViewKind
{
    /// <summary>A radiation thermometer on the axis in front of the aperture, which sees a spot in the aperture plane.</summary>
    Cone,

    /// <summary>Parallel rays along the axis.</summary>
    Beam,

    /// <summary>All radiation that leaves the aperture.</summary>
    Hemispherical,
}
