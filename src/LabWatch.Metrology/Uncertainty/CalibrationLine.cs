namespace LabWatch.Metrology.Uncertainty;

/// <summary>
/// Straight line through calibration points by ordinary least squares, y = Intercept + Slope (x - Origin): JCGM 100:2008, annex H.3.
/// </summary>
/// <param name="Origin">The x that the intercept belongs to.</param>
/// <param name="Intercept">y at the origin, with n - 2 degrees of freedom.</param>
/// <param name="Slope">Slope, with n - 2 degrees of freedom.</param>
/// <param name="Correlation">Correlation coefficient of intercept and slope.</param>
/// <param name="ResidualDeviation">Standard deviation of the residuals.</param>
public sealed record CalibrationLine(double Origin, Estimate Intercept, Estimate Slope, double Correlation, double ResidualDeviation)
{
    /// <summary>Fits the line.</summary>
    /// <param name="x">Abscissas, at least three, not all equal.</param>
    /// <param name="y">Ordinates, as many.</param>
    /// <param name="origin">The x that the intercept belongs to.</param>
    /// <exception cref="ArgumentException">There are fewer than three points, or the counts differ.</exception>
    public static CalibrationLine Fit(ReadOnlySpan<double> x, ReadOnlySpan<double> y, double origin)
    {
        if (x.Length < 3 || x.Length != y.Length)
        {
            throw new ArgumentException("At least three points are needed, a y for each x.", nameof(x));
        }

        int n = x.Length;
        double meanX = Mean(x);
        double meanY = Mean(y);
        double sumXX = 0;
        double sumXY = 0;
        for (int i = 0; i < n; i++)
        {
            sumXX += (x[i] - meanX) * (x[i] - meanX);
            sumXY += (x[i] - meanX) * (y[i] - meanY);
        }

        double slope = sumXY / sumXX;
        double squares = 0;
        for (int i = 0; i < n; i++)
        {
            double residual = y[i] - meanY - (slope * (x[i] - meanX));
            squares += residual * residual;
        }

        double s = Math.Sqrt(squares / (n - 2));
        double distance = origin - meanX;
        double interceptDeviation = s * Math.Sqrt((1.0 / n) + (distance * distance / sumXX));
        double slopeDeviation = s / Math.Sqrt(sumXX);
        double correlation = distance / Math.Sqrt((sumXX / n) + (distance * distance));
        return new(
            origin,
            new(meanY + (slope * distance), interceptDeviation, n - 2),
            new(slope, slopeDeviation, n - 2),
            correlation,
            s);
    }

    /// <summary>The line's value at an x, its uncertainty with the correlation of intercept and slope.</summary>
    public Estimate At(double x)
    {
        double distance = x - Origin;
        double a = Intercept.StandardUncertainty;
        double b = distance * Slope.StandardUncertainty;
        return new(
            Intercept.Value + (Slope.Value * distance),
            Math.Sqrt((a * a) + (b * b) + (2 * a * b * Correlation)),
            Intercept.DegreesOfFreedom);
    }

    private static double Mean(ReadOnlySpan<double> values)
    {
        double sum = 0;
        foreach (double value in values)
        {
            sum += value;
        }

        return sum / values.Length;
    }
}
