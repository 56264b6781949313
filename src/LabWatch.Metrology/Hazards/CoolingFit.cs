namespace LabWatch.Metrology.Hazards;

/// <summary>A fitted cooling curve: T - T_a = Amplitude exp(-Rate t), t from the last reading.</summary>
internal readonly record struct CoolingFit(
    double Amplitude, double Rate, double AmplitudeVariance, double RateVariance, double Covariance, double Residual, double EffectiveCount)
{
    public double RateDeviation => Math.Sqrt(RateVariance);

    public static CoolingFit Of(CoolingNormals normals, double amplitude, double rate, int count)
    {
        // AR(1) residuals carry the information of n (1 - r) / (1 + r) independent ones.
        double correlation = normals.SumOfSquares > 0 ? Math.Clamp(normals.LagSum / normals.SumOfSquares, 0, 0.99) : 0;
        double effective = Math.Max(3, count * (1 - correlation) / (1 + correlation));
        double variance = normals.SumOfSquares / (count - 2) * count / effective;
        (double a, double k, double both) = normals.Inverse();
        return new(amplitude, rate, variance * a, variance * k, variance * both, Math.Sqrt(normals.SumOfSquares / count), effective);
    }

    /// <summary>Seconds from the last reading until an excess over ambient; negative where it was passed before.</summary>
    public double TimeTo(double excess) => Math.Log(Amplitude / excess) / Rate;

    /// <summary>Variance of that time from the scatter of the readings.</summary>
    public double TimeVariance(double excess)
    {
        double byAmplitude = 1 / (Amplitude * Rate);
        double byRate = -TimeTo(excess) / Rate;
        return (byAmplitude * byAmplitude * AmplitudeVariance) + (byRate * byRate * RateVariance) + (2 * byAmplitude * byRate * Covariance);
    }
}
