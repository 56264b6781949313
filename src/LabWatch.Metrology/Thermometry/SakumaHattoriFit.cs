using LabWatch.Metrology.Radiometry;
using MathNet.Numerics.LinearAlgebra;

namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Parameters of the Sakuma-Hattori equation from measured points: exact through three, least squares in temperature through more
/// (Levenberg-Marquardt on A, B and ln C; unit weights).
/// </summary>
/// <param name="Characteristic">The equation found.</param>
/// <param name="RmsKelvin">Root mean square of the differences T_SH(S_i) - T_i over all n points, kelvin.</param>
/// <param name="Converged">Whether the iteration came to rest.</param>
public sealed record SakumaHattoriFit(SakumaHattori Characteristic, double RmsKelvin, bool Converged)
{
    private const int MaximumSteps = 200;

    /// <summary>Fits the equation.</summary>
    /// <param name="kelvin">Temperatures, kelvin, at least three different ones.</param>
    /// <param name="signals">Signals, positive, as many.</param>
    /// <param name="startMicrometre">A to start from, micrometre: the middle of the band.</param>
    /// <param name="secondRadiationConstant">c2, m K.</param>
    /// <exception cref="ArgumentException">Fewer than three points, or counts differ.</exception>
    public static SakumaHattoriFit To(
        IReadOnlyList<double> kelvin,
        IReadOnlyList<double> signals,
        double startMicrometre,
        double secondRadiationConstant = RadiationConstants.SecondOfIts90)
    {
        ArgumentNullException.ThrowIfNull(kelvin);
        ArgumentNullException.ThrowIfNull(signals);
        if (kelvin.Count < 3 || kelvin.Count != signals.Count)
        {
            throw new ArgumentException("At least three points are needed, a signal for each temperature.", nameof(kelvin));
        }

        SakumaHattori start = new(startMicrometre, 0, 1, secondRadiationConstant);
        int middle = kelvin.Count / 2;
        Vector<double> p = Vector<double>.Build.Dense([startMicrometre, 0, Math.Log(signals[middle] / start.Signal(kelvin[middle]))]);
        double damping = 1e-3;
        double best = SumOfSquares(p);
        bool converged = false;
        for (int step = 0; step < MaximumSteps && !converged; step++)
        {
            (Matrix<double> jacobian, Vector<double> residuals) = Linearise(p);
            Vector<double> scale = Vector<double>.Build.Dense(3, k => jacobian.Column(k).L2Norm());
            Matrix<double> scaled = Matrix<double>.Build.Dense(kelvin.Count, 3, (i, k) => jacobian[i, k] / scale[k]);
            Matrix<double> stacked = scaled.Stack(Matrix<double>.Build.DenseIdentity(3) * Math.Sqrt(damping));
            Vector<double> target = Vector<double>.Build.Dense(kelvin.Count + 3, i => i < kelvin.Count ? -residuals[i] : 0);
            Vector<double> change = stacked.QR().Solve(target).PointwiseDivide(scale);
            double next = SumOfSquares(p + change);
            if (next <= best)
            {
                converged = change.PointwiseMultiply(scale).L2Norm() < 1e-10 * (1 + Math.Sqrt(best)) || next < 1e-24;
                p += change;
                best = next;
                damping = Math.Max(damping / 10, 1e-14);
            }
            else
            {
                damping *= 10;
                converged = damping > 1e6;
            }
        }

        return new(Of(p), Math.Sqrt(best / kelvin.Count), converged && double.IsFinite(best));

        SakumaHattori Of(Vector<double> parameters) => new(parameters[0], parameters[1], Math.Exp(parameters[2]), secondRadiationConstant);

        double SumOfSquares(Vector<double> parameters)
        {
            SakumaHattori equation = Of(parameters);
            double sum = 0;
            for (int i = 0; i < kelvin.Count; i++)
            {
                double residual = equation.Kelvin(signals[i]) - kelvin[i];
                sum += residual * residual;
            }

            return double.IsNaN(sum) ? double.PositiveInfinity : sum;
        }

        (Matrix<double> Jacobian, Vector<double> Residuals) Linearise(Vector<double> parameters)
        {
            SakumaHattori equation = Of(parameters);
            Matrix<double> jacobian = Matrix<double>.Build.Dense(kelvin.Count, 3);
            Vector<double> residuals = Vector<double>.Build.Dense(kelvin.Count);
            for (int i = 0; i < kelvin.Count; i++)
            {
                double t = equation.Kelvin(signals[i]);
                residuals[i] = t - kelvin[i];
                jacobian[i, 0] = -t / equation.AMicrometre;
                jacobian[i, 1] = -1 / equation.AMicrometre;

                // S depends on T and ln C: dT/d(ln C) at fixed S is -S / (dS/dT).
                jacobian[i, 2] = -signals[i] / equation.SignalSlope(t);
            }

            return (jacobian, residuals);
        }
    }
}
