namespace LabWatch.Metrology.Uncertainty;

/// <summary>Shape of the distribution that is assigned to an input quantity (JCGM 101:2008, 6.4).</summary>
public enum DistributionShape
{
    /// <summary>Normal; with finite degrees of freedom Student's t, scaled and shifted.</summary>
    Normal,

    /// <summary>Rectangular (half-width = sqrt(3) u).</summary>
    Rectangular,

    /// <summary>Triangular (half-width = sqrt(6) u).</summary>
    Triangular,

    /// <summary>Arcsine, U-shaped, as of a cycling temperature (half-width = sqrt(2) u).</summary>
    Arcsine,
}
