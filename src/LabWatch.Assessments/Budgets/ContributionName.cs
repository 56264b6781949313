namespace LabWatch.Assessments.Budgets;

/// <summary>The contributions that are measured, or follow from what is stated about the source.</summary>
public static class ContributionName
{
    /// <summary>Certificates and scatter of the reference and the other wells.</summary>
    public const string Wells = "reference-and-wells";

    /// <summary>Instability over the window.</summary>
    public const string Stability = "stability";

    /// <summary>Well-to-wall drop.</summary>
    public const string WellToWall = "well-to-wall";

    /// <summary>Lip, and how the wall falls to it.</summary>
    public const string Lip = "profile-to-lip";

    /// <summary>Emissivity of the coating, and of a second material.</summary>
    public const string Emissivity = "coating-emissivity";

    /// <summary>Diffuse fraction of the reflection.</summary>
    public const string DiffuseFraction = "diffuse-fraction";

    /// <summary>Surroundings that the cavity reflects.</summary>
    public const string Surroundings = "surroundings";

    /// <summary>Zones and method.</summary>
    public const string Numerical = "numerical";

    /// <summary>In the order in which they are shown.</summary>
    public static IReadOnlyList<string> All { get; } = [Wells, Stability, WellToWall, Lip, Emissivity, DiffuseFraction, Surroundings, Numerical];
}
