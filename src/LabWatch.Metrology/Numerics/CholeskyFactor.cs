namespace LabWatch.Metrology.Numerics;

/// <summary>The Cholesky factor of a symmetric positive definite matrix: V = L L'.</summary>
internal sealed class CholeskyFactor
{
    private readonly double[,] _lower;

    private CholeskyFactor(double[,] lower) => _lower = lower;

    /// <summary>The logarithm of the determinant of V.</summary>
    public double LogDeterminant
    {
        get
        {
            double sum = 0;
            for (int i = 0; i < _lower.GetLength(0); i++) sum += 2 * Math.Log(_lower[i, i]);
            return sum;
        }
    }

    /// <summary>The factor; null where the matrix is not positive definite to all digits.</summary>
    public static CholeskyFactor? Of(double[,] matrix)
    {
        int n = matrix.GetLength(0);
        double[,] lower = new double[n, n];
        for (int j = 0; j < n; j++)
        {
            double diagonal = matrix[j, j];
            for (int k = 0; k < j; k++) diagonal -= lower[j, k] * lower[j, k];
            if (!(diagonal > 1e-15 * Math.Abs(matrix[j, j]))) return null;
            lower[j, j] = Math.Sqrt(diagonal);
            for (int i = j + 1; i < n; i++)
            {
                double sum = matrix[i, j];
                for (int k = 0; k < j; k++) sum -= lower[i, k] * lower[j, k];
                lower[i, j] = sum / lower[j, j];
            }
        }

        return new CholeskyFactor(lower);
    }

    /// <summary>L^-1 times a vector: its parts become independent with unit variance where V is its covariance.</summary>
    public double[] Whiten(ReadOnlySpan<double> vector)
    {
        double[] result = new double[vector.Length];
        for (int i = 0; i < result.Length; i++)
        {
            double sum = vector[i];
            for (int k = 0; k < i; k++) sum -= _lower[i, k] * result[k];
            result[i] = sum / _lower[i, i];
        }

        return result;
    }
}
