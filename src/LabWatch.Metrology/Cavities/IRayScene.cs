namespace LabWatch.Metrology.Cavities;

/// <summary>A cavity as rays see it. Structures, so that the tracer is compiled for each.</summary>
internal interface IRayScene
{
    /// <summary>Moves a ray to its next hit; false where it leaves through the aperture.</summary>
    bool Advance(ref Ray ray);

    /// <summary>Unit normal into the cavity at a hit.</summary>
    (double R, double Z) Normal(in Ray ray);

    /// <summary>View factor from a hit to the aperture.</summary>
    double ToAperture(in Ray ray);

    /// <summary>Distance of a hit along its line of the meridian.</summary>
    double Along(in Ray ray);
}
