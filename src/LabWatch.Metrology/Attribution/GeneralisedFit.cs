using LabWatch.Metrology.Numerics;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using MathNet.Numerics;

namespace LabWatch.Metrology.Attribution;

/// <summary>
/// A generalised least-squares fit of y = X b with a known covariance of y (A. C. Aitken, Proc. R. Soc. Edinb. 55 (1935) 42-48): the observations are made independent
/// by the Cholesky factor of the covariance, then fitted by Householder reflections.
/// </summary>
public sealed class GeneralisedFit
{
    private readonly double[,] _covariance;

    private GeneralisedFit(double[] values, double[,] covariance, double chiSquared, int degreesOfFreedom)
    {
        _covariance = covariance;
        Coefficients = [.. values.Select((value, j) => new Estimate(value, Math.Sqrt(covariance[j, j])))];
        (ChiSquared, DegreesOfFreedom) = (chiSquared, degreesOfFreedom);
    }

    /// <summary>Coefficients with their standard uncertainties from the covariance of the observations.</summary>
    public IReadOnlyList<Estimate> Coefficients { get; }

    /// <summary>Sum of the squared normalised residuals.</summary>
    public double ChiSquared { get; }

    /// <summary>Observations less coefficients.</summary>
    public int DegreesOfFreedom { get; }

    /// <summary>Birge ratio: square root of chi-squared over the degrees of freedom (R. T. Birge, Phys. Rev. 40 (1932) 207-227); NaN without any.</summary>
    public double BirgeRatio => DegreesOfFreedom > 0 ? Math.Sqrt(ChiSquared / DegreesOfFreedom) : double.NaN;

    /// <summary>Probability of a chi-squared as large or larger if the model holds; 1 without degrees of freedom.</summary>
    public double Probability => DegreesOfFreedom > 0 ? SpecialFunctions.GammaUpperRegularized(DegreesOfFreedom / 2.0, ChiSquared / 2) : 1;

    /// <summary>Correlation of two coefficients.</summary>
    public double Correlation(int first, int second) =>
        _covariance[first, second] / Math.Sqrt(_covariance[first, first] * _covariance[second, second]);

    /// <summary>Fits; null where the covariance is not positive definite or the columns do not determine the coefficients.</summary>
    /// <param name="design">One row an observation.</param>
    /// <param name="observations">One value a row.</param>
    /// <param name="covariance">Covariance of the observations.</param>
    public static GeneralisedFit? Of(IReadOnlyList<double[]> design, ReadOnlySpan<double> observations, double[,] covariance)
    {
        ArgumentNullException.ThrowIfNull(design);
        ArgumentNullException.ThrowIfNull(covariance);
        int n = design.Count, p = n == 0 ? 0 : design[0].Length;
        if (observations.Length != n || covariance.GetLength(0) != n || covariance.GetLength(1) != n)
        {
            throw new ArgumentException("Design, observations and covariance have to have one row for each observation.", nameof(design));
        }

        if (p == 0 || n < p || CholeskyFactor.Of(covariance) is not { } factor) return null;
        double[][] white = [.. Enumerable.Range(0, n).Select(_ => new double[p])];
        for (int j = 0; j < p; j++)
        {
            double[] column = factor.Whiten([.. design.Select(row => row[j])]);
            for (int i = 0; i < n; i++) white[i][j] = column[i];
        }

        double[] right = factor.Whiten(observations);
        if (HouseholderFit.Of(white) is not { } qr) return null;
        double[] values = qr.Solve([.. right]);
        double chiSquared = 0;
        for (int i = 0; i < n; i++)
        {
            double residual = right[i];
            for (int j = 0; j < p; j++) residual -= white[i][j] * values[j];
            chiSquared += residual * residual;
        }

        return new GeneralisedFit(values, qr.Covariance(1), chiSquared, n - p);
    }

    /// <summary>The covariance of independent observations.</summary>
    public static double[,] Independent(IReadOnlyList<double> standardUncertainties)
    {
        ArgumentNullException.ThrowIfNull(standardUncertainties);
        double[,] covariance = new double[standardUncertainties.Count, standardUncertainties.Count];
        for (int i = 0; i < standardUncertainties.Count; i++) covariance[i, i] = standardUncertainties[i] * standardUncertainties[i];
        return covariance;
    }
}
