using MathNet.Numerics.LinearAlgebra;

namespace LabWatch.Metrology.Thermometry;

/// <summary>Deviation function of a standard platinum resistance thermometer from its ratios at the fixed points of a subrange.</summary>
public static class SprtFit
{
    private const double AluminiumKelvin = 933.473;

    /// <summary>
    /// Solves for the coefficients: exactly from as many points as there are coefficients, by least squares from more. The term of d uses the
    /// thermometer's own W(933.473 K), which must be among the points of that subrange.
    /// </summary>
    /// <param name="subrange">The subrange.</param>
    /// <param name="points">Temperature (kelvin) and measured ratio W of each fixed point.</param>
    /// <exception cref="ArgumentException">There are too few points, or the aluminium point is missing.</exception>
    public static SprtDeviation Solve(SprtSubrange subrange, IReadOnlyList<(double Kelvin, double Ratio)> points)
    {
        ArgumentNullException.ThrowIfNull(points);
        int count = SprtSubranges.Coefficients(subrange).Count;
        double aluminium = points.Where(point => Math.Abs(point.Kelvin - AluminiumKelvin) < 0.01).Select(point => point.Ratio).FirstOrDefault(double.NaN);
        if (points.Count < count || (subrange == SprtSubrange.WaterToSilver && double.IsNaN(aluminium)))
        {
            throw new ArgumentException("There are too few points, or the aluminium point is missing.", nameof(points));
        }

        // The deviation is linear in its coefficients: column k is the function with coefficient k alone at 1.
        SprtDeviation[] basis =
        [
            .. Enumerable.Range(0, count).Select(k => new SprtDeviation(subrange, [.. Enumerable.Range(0, count).Select(i => i == k ? 1.0 : 0.0)], aluminium)),
        ];
        Matrix<double> design = Matrix<double>.Build.Dense(points.Count, count, (i, k) => basis[k].Value(points[i].Ratio));
        Vector<double> deviations = Vector<double>.Build.Dense(points.Count, i => points[i].Ratio - Its90.Ratio(points[i].Kelvin));
        Vector<double> solution = points.Count == count ? design.LU().Solve(deviations) : design.QR().Solve(deviations);
        return new(subrange, [.. solution], aluminium);
    }
}
