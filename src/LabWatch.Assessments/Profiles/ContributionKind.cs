namespace LabWatch.Assessments.Profiles;

/// <summary>An input of the radiance that leaves a cavity.</summary>
public enum ContributionKind
{
    /// <summary>A well thermometer.</summary>
    Well,

    /// <summary>The lip thermometer.</summary>
    Lip,

    /// <summary>How the wall falls from the well nearest to the aperture to the lip.</summary>
    LipShape,

    /// <summary>The well-to-wall drop, common to all wells.</summary>
    WellToWall,

    /// <summary>The surroundings.</summary>
    Surroundings,

    /// <summary>Emissivity of the coating.</summary>
    Emissivity,

    /// <summary>Emissivity of the second material.</summary>
    SecondEmissivity,

    /// <summary>Diffuse fraction of the reflection.</summary>
    DiffuseFraction,

    /// <summary>The zones: radiance is taken as linear between nodes.</summary>
    Discretisation,

    /// <summary>Numerical error of the method: Monte Carlo standard error, or the estimated error of the others.</summary>
    Method,
}
