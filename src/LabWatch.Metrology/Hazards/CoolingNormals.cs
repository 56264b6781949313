namespace LabWatch.Metrology.Hazards;

/// <summary>Normal equations of the cooling curve at one set of parameters, with the residuals' scatter and lag-1 correlation.</summary>
internal readonly record struct CoolingNormals(
    double AA, double AK, double KK, double AR, double KR, double SumOfSquares, double LagSum)
{
    public static CoolingNormals Of(ReadOnlySpan<double> seconds, ReadOnlySpan<double> celsius, double ambient, double amplitude, double rate)
    {
        double aa = 0, ak = 0, kk = 0, ar = 0, kr = 0, squares = 0, lag = 0;
        double previous = 0;
        double end = seconds[^1];
        for (int i = 0; i < seconds.Length; i++)
        {
            double time = seconds[i] - end;
            double decay = Math.Exp(-rate * time);
            double slope = -amplitude * time * decay;
            double residual = celsius[i] - ambient - (amplitude * decay);
            aa += decay * decay;
            ak += decay * slope;
            kk += slope * slope;
            ar += decay * residual;
            kr += slope * residual;
            squares += residual * residual;
            lag += residual * previous;
            previous = residual;
        }

        return new(aa, ak, kk, ar, kr, squares, lag);
    }

    private double Determinant => (AA * KK) - (AK * AK);

    /// <summary>Changes of amplitude and rate.</summary>
    public (double Amplitude, double Rate) Solve() => (((KK * AR) - (AK * KR)) / Determinant, ((AA * KR) - (AK * AR)) / Determinant);

    /// <summary>Elements of the inverse matrix: variance factors of amplitude and rate and their covariance.</summary>
    public (double Amplitude, double Rate, double Both) Inverse() => (KK / Determinant, AA / Determinant, -AK / Determinant);
}
