namespace LabWatch.Metrology.Numerics;

/// <summary>Small dense systems of equations by Gaussian elimination with partial pivoting, in one fixed order.</summary>
internal static class LinearSystem
{
    /// <summary>Solves matrix times x = right; both are overwritten.</summary>
    /// <exception cref="ArithmeticException">The matrix is singular.</exception>
    public static double[] Solve(double[,] matrix, double[] right)
    {
        int n = right.Length;
        for (int column = 0; column < n; column++)
        {
            int pivot = column;
            for (int row = column + 1; row < n; row++)
            {
                if (Math.Abs(matrix[row, column]) > Math.Abs(matrix[pivot, column])) pivot = row;
            }

            if (matrix[pivot, column] == 0) throw new ArithmeticException("The equations are singular.");
            if (pivot != column) Swap(matrix, right, pivot, column);
            for (int row = column + 1; row < n; row++)
            {
                double factor = matrix[row, column] / matrix[column, column];
                if (factor == 0) continue;
                for (int k = column; k < n; k++) matrix[row, k] -= factor * matrix[column, k];
                right[row] -= factor * right[column];
            }
        }

        for (int row = n - 1; row >= 0; row--)
        {
            double sum = right[row];
            for (int k = row + 1; k < n; k++) sum -= matrix[row, k] * right[k];
            right[row] = sum / matrix[row, row];
        }

        return right;
    }

    private static void Swap(double[,] matrix, double[] right, int a, int b)
    {
        for (int k = 0; k < right.Length; k++) (matrix[a, k], matrix[b, k]) = (matrix[b, k], matrix[a, k]);
        (right[a], right[b]) = (right[b], right[a]);
    }
}
