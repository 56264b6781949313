namespace LabWatch.Metrology.Uncertainty;

/// <summary>Welch-Satterthwaite formula, JCGM 100:2008, equation G.2b, for independent contributions.</summary>
public static class EffectiveDegreesOfFreedom
{
    /// <summary>
    /// u_c^4 / sum(u_i^4 / nu_i), of contributions already multiplied by their sensitivities. Infinity where no contribution with finite degrees
    /// of freedom has an uncertainty.
    /// </summary>
    public static double Of(ReadOnlySpan<(double Contribution, double DegreesOfFreedom)> contributions)
    {
        double largest = 0;
        foreach ((double contribution, _) in contributions)
        {
            largest = Math.Max(largest, Math.Abs(contribution));
        }

        if (largest == 0)
        {
            return double.PositiveInfinity;
        }

        double variance = 0;
        double sum = 0;
        foreach ((double contribution, double degrees) in contributions)
        {
            // Scaled, so that the fourth powers of very small or large uncertainties stay representable.
            double square = contribution / largest * (contribution / largest);
            variance += square;
            sum += square * square / degrees;
        }

        return variance * variance / sum;
    }
}
