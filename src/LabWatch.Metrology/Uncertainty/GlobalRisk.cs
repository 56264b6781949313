using MathNet.Numerics.Integration;

namespace LabWatch.Metrology.Uncertainty;

/// <summary>
/// Risks of a decision before measuring, for items from a normal process and a normal measurement: JCGM 106:2012, equations 17 to 19, by
/// composite Gauss-Legendre quadrature (relative error below 1e-9).
/// </summary>
public static class GlobalRisk
{
    private const double Reach = 12;
    private const int PanelsPerDeviation = 2;
    private const int Order = 20;

    /// <summary>Probability that an item does not conform and is accepted.</summary>
    /// <param name="process">Mean and standard deviation of the process.</param>
    /// <param name="measurementUncertainty">Standard uncertainty of the measurement, positive.</param>
    /// <param name="tolerance">What conforms.</param>
    /// <param name="acceptance">What is accepted.</param>
    public static double Consumer(Estimate process, double measurementUncertainty, ToleranceInterval tolerance, ToleranceInterval acceptance)
    {
        double Integrand(double x) => ProcessDensity(process, x) * Inside(x, measurementUncertainty, acceptance);
        double low = process.Value - (Reach * process.StandardUncertainty);
        double high = process.Value + (Reach * process.StandardUncertainty);
        double step = Math.Min(process.StandardUncertainty, measurementUncertainty);
        return Integrate(Integrand, low, Math.Min(high, tolerance.Lower), step) + Integrate(Integrand, Math.Max(low, tolerance.Upper), high, step);
    }

    /// <summary>Probability that an item conforms and is rejected. Parameters as for <see cref="Consumer"/>.</summary>
    public static double Producer(Estimate process, double measurementUncertainty, ToleranceInterval tolerance, ToleranceInterval acceptance)
    {
        double Integrand(double x) => ProcessDensity(process, x)
            * (NormalDistribution.UpperTail((acceptance.Upper - x) / measurementUncertainty)
                + NormalDistribution.UpperTail((x - acceptance.Lower) / measurementUncertainty));
        double low = Math.Max(tolerance.Lower, process.Value - (Reach * process.StandardUncertainty));
        double high = Math.Min(tolerance.Upper, process.Value + (Reach * process.StandardUncertainty));
        return Integrate(Integrand, low, high, Math.Min(process.StandardUncertainty, measurementUncertainty));
    }

    private static double ProcessDensity(Estimate process, double x) =>
        NormalDistribution.Density((x - process.Value) / process.StandardUncertainty) / process.StandardUncertainty;

    private static double Inside(double x, double u, ToleranceInterval acceptance) =>
        x > acceptance.Upper
            ? NormalDistribution.UpperTail((x - acceptance.Upper) / u) - NormalDistribution.UpperTail((x - acceptance.Lower) / u)
            : NormalDistribution.UpperTail((acceptance.Lower - x) / u) - NormalDistribution.UpperTail((acceptance.Upper - x) / u);

    private static double Integrate(Func<double, double> integrand, double low, double high, double step)
    {
        if (!(high > low))
        {
            return 0;
        }

        int panels = (int)Math.Min(4000, Math.Ceiling((high - low) / step * PanelsPerDeviation));
        double width = (high - low) / panels;
        double sum = 0;
        for (int i = 0; i < panels; i++)
        {
            sum += GaussLegendreRule.Integrate(integrand, low + (i * width), low + ((i + 1) * width), Order);
        }

        return sum;
    }
}
