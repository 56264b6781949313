using LabWatch.Metrology.Numerics;
using LabWatch.Metrology.Uncertainty;
using MathNet.Numerics;

namespace LabWatch.Metrology.Statistics;

/// <summary>Constants of Shewhart charts for samples of n normal values (ISO 7870-2), computed: mean and deviation of the range and of the standard deviation.</summary>
public static class ShewhartConstants
{
    /// <summary>Mean of the sample standard deviation over sigma.</summary>
    public static double C4(int n) => Math.Sqrt(2.0 / (n - 1)) * Math.Exp(SpecialFunctions.GammaLn(n / 2.0) - SpecialFunctions.GammaLn((n - 1) / 2.0));

    /// <summary>Mean of the range over sigma: integral of 1 - F^n - (1 - F)^n (L. H. C. Tippett, Biometrika 17 (1925) 364-387).</summary>
    public static double D2(int n) => Integrate((z, f, g) => 1 - Math.Pow(f, n) - Math.Pow(g, n));

    /// <summary>Standard deviation of the range over sigma.</summary>
    public static double D3Small(int n)
    {
        double mean = D2(n);
        // E(range^2) = 2 integral over x < y of 1 - F(y)^n - (1 - F(x))^n + (F(y) - F(x))^n.
        double square = 0;
        (double[] x, double[] w) = GaussLegendre.Rule(80);
        for (int i = 0; i < x.Length; i++)
        {
            double y = Reach * x[i], fy = NormalDistribution.Cdf(y), inner = 0, half = (y + Reach) / 2;
            for (int j = 0; j < x.Length; j++)
            {
                double low = -Reach + half * (1 + x[j]), fx = NormalDistribution.Cdf(low);
                inner += w[j] * half * (1 - Math.Pow(fy, n) - Math.Pow(1 - fx, n) + Math.Pow(fy - fx, n));
            }

            square += w[i] * Reach * 2 * inner;
        }

        return Math.Sqrt(square - mean * mean);
    }

    /// <summary>Limits of a chart of means from the mean range.</summary>
    public static double A2(int n) => 3 / (D2(n) * Math.Sqrt(n));

    /// <summary>Limits of a chart of means from the mean standard deviation.</summary>
    public static double A3(int n) => 3 / (C4(n) * Math.Sqrt(n));

    /// <summary>Lower limit of a chart of standard deviations.</summary>
    public static double B3(int n) => Math.Max(0, 1 - Spread(n));

    /// <summary>Upper limit of a chart of standard deviations.</summary>
    public static double B4(int n) => 1 + Spread(n);

    /// <summary>Lower limit of a chart of ranges.</summary>
    public static double D3(int n) => Math.Max(0, 1 - 3 * D3Small(n) / D2(n));

    /// <summary>Upper limit of a chart of ranges.</summary>
    public static double D4(int n) => 1 + 3 * D3Small(n) / D2(n);

    private const double Reach = 9;

    private static double Spread(int n)
    {
        double c4 = C4(n);
        return 3 * Math.Sqrt(1 - c4 * c4) / c4;
    }

    private static double Integrate(Func<double, double, double, double> integrand)
    {
        (double[] x, double[] w) = GaussLegendre.Rule(120);
        double sum = 0;
        for (int i = 0; i < x.Length; i++)
        {
            double z = Reach * x[i];
            sum += w[i] * Reach * integrand(z, NormalDistribution.Cdf(z), NormalDistribution.UpperTail(z));
        }

        return sum;
    }
}
