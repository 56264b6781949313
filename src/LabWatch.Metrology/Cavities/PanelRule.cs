using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Cavities;

/// <summary>A Gauss-Legendre rule with the barycentric weights of its nodes (J.-P. Berrut and L. N. Trefethen, SIAM Rev. 46 (2004) 501-517).</summary>
internal sealed class PanelRule
{
    private readonly double[] _barycentric;

    public PanelRule(int order)
    {
        (X, W) = GaussLegendre.Rule(order);
        _barycentric = new double[order];
        for (int i = 0; i < order; i++) _barycentric[i] = (i % 2 == 0 ? 1 : -1) * Math.Sqrt((1 - X[i] * X[i]) * W[i]);
    }

    public double[] X { get; }

    public double[] W { get; }

    /// <summary>Adds <paramref name="factor"/> times the Lagrange polynomials of the nodes at <paramref name="u"/>.</summary>
    public void AddBasis(double u, double factor, Span<double> sums)
    {
        double total = 0;
        Span<double> terms = stackalloc double[X.Length];
        for (int i = 0; i < X.Length; i++)
        {
            double d = u - X[i];
            if (Math.Abs(d) < 1e-15)
            {
                sums[i] += factor;
                return;
            }

            total += terms[i] = _barycentric[i] / d;
        }

        double scale = factor / total;
        for (int i = 0; i < X.Length; i++) sums[i] += scale * terms[i];
    }
}
