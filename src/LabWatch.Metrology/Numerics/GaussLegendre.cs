namespace LabWatch.Metrology.Numerics;

/// <summary>Gauss-Legendre rules on [-1, 1]: the roots of P_n by Newton's method from Tricomi's start (NIST Digital Library of Mathematical Functions, 3.5(v)).</summary>
internal static class GaussLegendre
{
    public static (double[] X, double[] W) Rule(int n)
    {
        double[] x = new double[n], w = new double[n];
        for (int i = 0; i < (n + 1) / 2; i++)
        {
            double z = Math.Cos(Math.PI * (i + 0.75) / (n + 0.5)), slope = 0;
            for (int pass = 0; pass < 8; pass++)
            {
                (double p, double derivative) = Legendre(n, z);
                slope = derivative;
                z -= p / derivative;
            }

            (x[i], x[n - 1 - i]) = (-z, z);
            w[i] = w[n - 1 - i] = 2 / ((1 - z * z) * slope * slope);
        }

        if (n % 2 == 1) x[n / 2] = 0;
        return (x, w);
    }

    private static (double P, double Derivative) Legendre(int n, double z)
    {
        double p = 1, before = 0;
        for (int k = 1; k <= n; k++) (p, before) = (((2 * k - 1) * z * p - (k - 1) * before) / k, p);
        return (p, n * (z * p - before) / (z * z - 1));
    }
}
