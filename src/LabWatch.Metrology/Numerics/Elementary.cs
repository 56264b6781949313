namespace LabWatch.Metrology.Numerics;

/// <summary>Elementary functions with full relative accuracy near zero, where those of the base library subtract nearly equal numbers.</summary>
internal static class Elementary
{
    /// <summary>exp(x) - 1, after W. Kahan (in N. J. Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed. 2002, 1.14.1).</summary>
    public static double ExpMinusOne(double x)
    {
        double u = Math.Exp(x);
        return x > 0.7 ? u - 1 : Small(x, u);

        static double Small(double x, double u)
        {
            double difference = u - 1;
            return u == 1 ? x : difference == -1 ? -1 : difference * x / Math.Log(u);
        }
    }

    /// <summary>ln(1 + x), same source.</summary>
    public static double LogOnePlus(double x)
    {
        double u = 1 + x;
        return u == 1 ? x : double.IsPositiveInfinity(u) ? u : Math.Log(u) * x / (u - 1);
    }
}
