namespace LabWatch.Metrology.Statistics;

/// <summary>A design matrix in the form Q R, by Householder reflections of its columns scaled to unit length.</summary>
internal sealed class HouseholderFit
{
    private readonly double[][] _columns;
    private readonly double[] _diagonal;
    private readonly double[] _scale;

    private HouseholderFit(double[][] columns, double[] diagonal, double[] scale) => (_columns, _diagonal, _scale) = (columns, diagonal, scale);

    /// <summary>The form; null where a column depends on those before it to all digits.</summary>
    public static HouseholderFit? Of(IReadOnlyList<double[]> design)
    {
        int n = design.Count, p = design[0].Length;
        double[][] columns = new double[p][];
        double[] diagonal = new double[p], scale = new double[p];
        for (int j = 0; j < p; j++)
        {
            columns[j] = new double[n];
            for (int i = 0; i < n; i++) columns[j][i] = design[i][j];
            scale[j] = Math.Sqrt(Dot(columns[j], columns[j], 0));
            if (!(scale[j] > 0)) return null;
            for (int i = 0; i < n; i++) columns[j][i] /= scale[j];
        }

        for (int k = 0; k < p; k++)
        {
            double norm = Math.Sqrt(Dot(columns[k], columns[k], k));
            if (!(norm > 1e-14)) return null;
            double alpha = columns[k][k] > 0 ? -norm : norm;
            columns[k][k] -= alpha;
            diagonal[k] = alpha;
            for (int j = k + 1; j < p; j++) Reflect(columns[k], columns[j], k);
        }

        return new HouseholderFit(columns, diagonal, scale);
    }

    /// <summary>Least-squares coefficients of a right-hand side, which is overwritten.</summary>
    public double[] Solve(double[] right)
    {
        int p = _diagonal.Length;
        for (int k = 0; k < p; k++) Reflect(_columns[k], right, k);
        double[] x = new double[p];
        for (int j = p - 1; j >= 0; j--)
        {
            double sum = right[j];
            for (int k = j + 1; k < p; k++) sum -= _columns[k][j] * x[k];
            x[j] = sum / _diagonal[j];
        }

        for (int j = 0; j < p; j++) x[j] /= _scale[j];
        return x;
    }

    /// <summary>Variance times the inverse of the normal matrix, from the inverse of R.</summary>
    public double[,] Covariance(double variance)
    {
        int p = _diagonal.Length;
        double[,] inverse = new double[p, p], covariance = new double[p, p];
        for (int c = 0; c < p; c++)
        {
            inverse[c, c] = 1 / _diagonal[c];
            for (int j = c - 1; j >= 0; j--)
            {
                double sum = 0;
                for (int k = j + 1; k <= c; k++) sum -= _columns[k][j] * inverse[k, c];
                inverse[j, c] = sum / _diagonal[j];
            }
        }

        for (int a = 0; a < p; a++)
        {
            for (int b = 0; b < p; b++)
            {
                double sum = 0;
                for (int k = Math.Max(a, b); k < p; k++) sum += inverse[a, k] * inverse[b, k];
                covariance[a, b] = variance * sum / (_scale[a] * _scale[b]);
            }
        }

        return covariance;
    }

    private static void Reflect(double[] v, double[] target, int from)
    {
        double factor = 2 * Dot(v, target, from) / Dot(v, v, from);
        for (int i = from; i < v.Length; i++) target[i] -= factor * v[i];
    }

    private static double Dot(double[] a, double[] b, int from)
    {
        CompensatedSum sum = default;
        for (int i = from; i < a.Length; i++) sum.Add(a[i] * b[i]);
        return sum.Value;
    }
}
