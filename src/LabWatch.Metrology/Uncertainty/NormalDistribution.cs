using MathNet.Numerics;

namespace LabWatch.Metrology.Uncertainty;

/// <summary>The standard normal distribution. Relative accuracy about 1e-14, in the tails too (checked to 1e-12).</summary>
public static class NormalDistribution
{
    private const double RootTwo = 1.4142135623730950488;
    private const double RootTwoPi = 2.5066282746310005024;

    /// <summary>Probability density at z.</summary>
    public static double Density(double z) => Math.Exp(-0.5 * z * z) / RootTwoPi;

    /// <summary>Probability of a value up to z.</summary>
    public static double Cdf(double z) => 0.5 * SpecialFunctions.Erfc(-z / RootTwo);

    /// <summary>Probability of a value above z.</summary>
    public static double UpperTail(double z) => Cdf(-z);

    /// <summary>The z that is exceeded with a probability, 0 to 1 (infinite at the ends); NaN outside.</summary>
    public static double UpperQuantile(double probability)
    {
        switch (probability)
        {
            case 0:
                return double.PositiveInfinity;
            case 1:
                return double.NegativeInfinity;
            case > 0 and < 1:
                double z = RootTwo * SpecialFunctions.ErfcInv(2 * probability);
                return z + ((UpperTail(z) - probability) / Density(z));
            default:
                return double.NaN;
        }
    }
}
