using LabWatch.Metrology.Numerics;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>
/// Average run lengths of control charts for independent normal values: the mean number of values until a chart signals, by the integral equation of the run length
/// (E. S. Page, Biometrika 41 (1954) 100-115; S. V. Crowder, Technometrics 29 (1987) 401-407). Shifts are in standard deviations, present from the start.
/// </summary>
public static class RunLength
{
    private const int Nodes = 160;
    private static readonly (double[] X, double[] W) Rule = GaussLegendre.Rule(Nodes);

    /// <summary>
    /// Of an exponentially weighted moving average with asymptotic limits, started at its centre (J. M. Lucas and M. S. Saccucci, Technometrics 32 (1990) 1-12).
    /// </summary>
    /// <param name="lambda">Weight of the newest value, above 0, at most 1.</param>
    /// <param name="limit">Limits in standard deviations of the average, positive.</param>
    /// <param name="shift">Shift of the mean.</param>
    public static double OfEwma(double lambda, double limit, double shift)
    {
        double reach = limit * Math.Sqrt(lambda / (2 - lambda));
        // From average u to y: the value is (y - (1 - lambda) u)/lambda.
        return Solve(-reach, reach, (u, y) => NormalDistribution.Density((y - (1 - lambda) * u) / lambda - shift) / lambda, null, 0);
    }

    /// <summary>Of a one-sided cumulative sum for an increase: C = max(0, C + x - k), signal above h.</summary>
    /// <param name="k">Reference value, half of the shift to be found.</param>
    /// <param name="h">Decision interval, positive.</param>
    /// <param name="shift">Shift of the mean; negative for the sum on the other side.</param>
    /// <param name="start">Head start, from 0 to h (J. M. Lucas and R. B. Crosier, Technometrics 24 (1982) 199-205).</param>
    public static double OfCusum(double k, double h, double shift, double start = 0) => Solve(
        0, h, (u, y) => NormalDistribution.Density(y - u + k - shift), u => NormalDistribution.Cdf(k - u - shift), start);

    /// <summary>Of cumulative sums on both sides with one head start.</summary>
    /// <inheritdoc cref="OfCusum"/>
    public static double OfTwoSidedCusum(double k, double h, double shift, double start = 0)
    {
        double up = OfCusum(k, h, shift), down = OfCusum(k, h, -shift);
        if (start == 0) return 1 / (1 / up + 1 / down);
        double upStart = OfCusum(k, h, shift, start), downStart = OfCusum(k, h, -shift, start);
        return (upStart * down + downStart * up - up * down) / (up + down);
    }

    /// <summary>Decision interval of a two-sided cumulative sum for an average run length without shift (D. M. Hawkins, J. Qual. Technol. 25 (1993) 248-261).</summary>
    /// <param name="k">Reference value, positive.</param>
    /// <param name="runLength">Average run length without shift, above 2.</param>
    public static double CusumInterval(double k, double runLength)
    {
        // From below: far above the interval sought the run length outgrows what the equations can hold.
        double low = 0.01, high = 0.5;
        while (OfTwoSidedCusum(k, high, 0) < runLength && high < 30) (low, high) = (high, high * 1.3);
        for (int i = 0; i < 60; i++)
        {
            double middle = (low + high) / 2;
            if (OfTwoSidedCusum(k, middle, 0) < runLength) low = middle;
            else high = middle;
        }

        return (low + high) / 2;
    }

    /// <summary>Siegmund's approximation for a one-sided cumulative sum (D. Siegmund, Sequential Analysis, 1985; from memory): a check, not for use.</summary>
    public static double SiegmundCusum(double k, double h, double shift)
    {
        double delta = shift - k, b = h + 1.166;
        return delta == 0 ? b * b : (Math.Exp(-2 * delta * b) + 2 * delta * b - 1) / (2 * delta * delta);
    }

    /// <summary>Of single values against limits on both sides.</summary>
    /// <param name="limit">Limits in standard deviations, positive.</param>
    /// <param name="shift">Shift of the mean.</param>
    public static double OfSingleValues(double limit, double shift) =>
        1 / (NormalDistribution.UpperTail(limit - shift) + NormalDistribution.UpperTail(limit + shift));

    /// <summary>
    /// Solves L(u) = 1 + L(floor) atFloor(u) + integral of L(y) density(u, y) for L(start) by the Nystrom method. Nodes within the reach of the density of each other
    /// make it spectral; 160 of them give 1e-9 for the charts in use.
    /// </summary>
    private static double Solve(double from, double to, Func<double, double, double> density, Func<double, double>? atFloor, double start)
    {
        int n = Nodes + (atFloor is null ? 0 : 1);
        double half = (to - from) / 2;
        double[] y = new double[n];
        for (int i = 0; i < Nodes; i++) y[i] = from + half * (1 + Rule.X[i]);
        if (atFloor is not null) y[Nodes] = from;
        double[,] matrix = new double[n, n];
        double[] right = new double[n];
        for (int i = 0; i < n; i++)
        {
            right[i] = 1;
            for (int j = 0; j < Nodes; j++) matrix[i, j] = -Rule.W[j] * half * density(y[i], y[j]);
            if (atFloor is not null) matrix[i, Nodes] = -atFloor(y[i]);
            matrix[i, i] += 1;
        }

        double[] lengths = LinearSystem.Solve(matrix, right);
        double result = 1 + (atFloor is null ? 0 : lengths[Nodes] * atFloor(start));
        for (int j = 0; j < Nodes; j++) result += Rule.W[j] * half * density(start, y[j]) * lengths[j];
        return result;
    }
}
