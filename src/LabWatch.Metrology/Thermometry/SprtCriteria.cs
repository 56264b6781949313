namespace LabWatch.Metrology.Thermometry;

/// <summary>What a thermometer must meet to interpolate the ITS-90 (Preston-Thomas 1990, 3.3): ratios W at fixed points.</summary>
public static class SprtCriteria
{
    /// <summary>Least W at the melting point of gallium, 29.7646 degC.</summary>
    public const double LeastAtGallium = 1.11807;

    /// <summary>Greatest W at the triple point of mercury, -38.8344 degC.</summary>
    public const double GreatestAtMercury = 0.844235;

    /// <summary>Least W at the freezing point of silver, 961.78 degC, for use up to there.</summary>
    public const double LeastAtSilver = 4.2844;
}
