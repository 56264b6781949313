namespace LabWatch.Metrology.Uncertainty;

/// <summary>Coverage factors from Student's t distribution, JCGM 100:2008, clause G.3 and table G.2.</summary>
public static class CoverageFactor
{
    /// <summary>
    /// The coverage probability used unless another is asked for: the 95.45 % of a normal distribution within two standard deviations,
    /// erf(sqrt 2), so that k is exactly 2 for infinite degrees of freedom.
    /// </summary>
    public const double DefaultProbability = 0.95449973610364158560;

    /// <summary>
    /// The factor k for effective degrees of freedom. They are taken as they are (JCGM 100:2008, G.4.1, permits this by interpolation);
    /// pass the whole number below them for the factor of the printed tables.
    /// </summary>
    /// <param name="degreesOfFreedom">Effective degrees of freedom, positive, infinity included; NaN otherwise.</param>
    /// <param name="probability">Coverage probability, 0 to 1.</param>
    public static double For(double degreesOfFreedom, double probability = DefaultProbability) =>
        StudentDistribution.UpperQuantile(0.5 * (1 - probability), degreesOfFreedom);
}
