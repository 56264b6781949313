using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Statistics;

/// <summary>A linear least-squares fit: y = sum of b_j x_j with the noise of each observation alike and independent.</summary>
public sealed class LeastSquares
{
    private readonly double[,] _covariance;

    private LeastSquares(double[] coefficients, double[,] covariance, double residualDeviation, int degreesOfFreedom)
    {
        Coefficients = [.. coefficients.Select((value, j) => new Estimate(value, Math.Sqrt(covariance[j, j]), Math.Max(1, degreesOfFreedom)))];
        (_covariance, ResidualDeviation, DegreesOfFreedom) = (covariance, residualDeviation, degreesOfFreedom);
    }

    /// <summary>Coefficients with standard errors.</summary>
    public IReadOnlyList<Estimate> Coefficients { get; }

    /// <summary>Standard deviation of the residuals, with n - p.</summary>
    public double ResidualDeviation { get; }

    /// <summary>Observations less coefficients.</summary>
    public int DegreesOfFreedom { get; }

    /// <summary>Covariance of two coefficients.</summary>
    public double Covariance(int first, int second) => _covariance[first, second];

    /// <summary>The expected value for one set of regressors, with the standard uncertainty of the fit alone, without that of a single observation.</summary>
    public Estimate Predict(ReadOnlySpan<double> regressors)
    {
        if (regressors.Length != Coefficients.Count) throw new ArgumentException("One regressor for each coefficient is needed.", nameof(regressors));
        double value = 0, variance = 0;
        for (int j = 0; j < regressors.Length; j++)
        {
            value += Coefficients[j].Value * regressors[j];
            for (int k = 0; k < regressors.Length; k++) variance += regressors[j] * _covariance[j, k] * regressors[k];
        }

        return new Estimate(value, Math.Sqrt(Math.Max(0, variance)), Math.Max(1, DegreesOfFreedom));
    }

    /// <summary>
    /// Fits by Householder reflections of the columns scaled to unit length (G. H. Golub, Numer. Math. 7 (1965) 206-216) with one step of refinement, whose residuals
    /// are summed with compensation.
    /// </summary>
    /// <param name="design">One row an observation, the same number of regressors in each; a column of ones for an intercept.</param>
    /// <param name="observations">One finite value a row; more than there are regressors, or as many.</param>
    /// <returns>The fit; null where the regressors do not determine the coefficients.</returns>
    public static LeastSquares? Fit(IReadOnlyList<double[]> design, ReadOnlySpan<double> observations)
    {
        ArgumentNullException.ThrowIfNull(design);
        int n = design.Count, p = n == 0 ? 0 : design[0].Length;
        if (observations.Length != n) throw new ArgumentException("One observation for each row is needed.", nameof(observations));
        if (p == 0 || n < p) return null;
        if (HouseholderFit.Of(design) is not { } qr) return null;
        double[] coefficients = qr.Solve(observations.ToArray());
        double[] residuals = Residuals(design, observations, coefficients);
        double[] correction = qr.Solve(residuals);
        for (int j = 0; j < p; j++) coefficients[j] += correction[j];
        residuals = Residuals(design, observations, coefficients);
        CompensatedSum squares = default;
        foreach (double e in residuals) squares.Add(e * e);
        double variance = n > p ? squares.Value / (n - p) : 0;
        return new LeastSquares(coefficients, qr.Covariance(variance), Math.Sqrt(variance), n - p);
    }

    private static double[] Residuals(IReadOnlyList<double[]> design, ReadOnlySpan<double> observations, double[] coefficients)
    {
        double[] residuals = new double[design.Count];
        for (int i = 0; i < residuals.Length; i++)
        {
            CompensatedSum sum = default;
            sum.Add(observations[i]);
            for (int j = 0; j < coefficients.Length; j++)
            {
                // The product and what it loses, so that the refinement sees more digits than the fit.
                double product = design[i][j] * coefficients[j];
                sum.Add(-product);
                sum.Add(-Math.FusedMultiplyAdd(design[i][j], coefficients[j], -product));
            }

            residuals[i] = sum.Value;
        }

        return residuals;
    }
}
