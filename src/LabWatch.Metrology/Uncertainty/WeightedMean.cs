using MathNet.Numerics;

namespace LabWatch.Metrology.Uncertainty;

/// <summary>
/// Weighted mean of independent results with their consistency: M. G. Cox, Metrologia 39 (2002) 589, procedure A; R. T. Birge, Phys. Rev. 40
/// (1932) 207.
/// </summary>
/// <param name="Value">Mean with weights 1/u^2.</param>
/// <param name="InternalUncertainty">(sum 1/u^2)^(-1/2): from the stated uncertainties.</param>
/// <param name="ChiSquared">Observed chi squared with n - 1 degrees of freedom.</param>
/// <param name="Count">Number of results n.</param>
public sealed record WeightedMean(double Value, double InternalUncertainty, double ChiSquared, int Count)
{
    /// <summary>Birge ratio sqrt(chi squared / (n - 1)); near 1 where the results agree as their uncertainties say. NaN for one result.</summary>
    public double BirgeRatio => Math.Sqrt(ChiSquared / (Count - 1));

    /// <summary>Birge ratio times internal uncertainty: from the scatter of the results.</summary>
    public double ExternalUncertainty => BirgeRatio * InternalUncertainty;

    /// <summary>The larger of internal and external uncertainty.</summary>
    public double ExpandedByScatter => Count > 1 ? Math.Max(1, BirgeRatio) * InternalUncertainty : InternalUncertainty;

    /// <summary>Probability of a chi squared above the observed one, by chance alone; below 0.05 the results are inconsistent. NaN for one result.</summary>
    public double Probability => Count > 1 ? SpecialFunctions.GammaUpperRegularized(0.5 * (Count - 1), 0.5 * ChiSquared) : double.NaN;

    /// <summary>Computes the mean.</summary>
    /// <param name="values">Results, at least one.</param>
    /// <param name="uncertainties">Their standard uncertainties, positive, as many.</param>
    /// <exception cref="ArgumentException">There is none, or the counts differ.</exception>
    public static WeightedMean Of(ReadOnlySpan<double> values, ReadOnlySpan<double> uncertainties)
    {
        if (values.Length == 0 || values.Length != uncertainties.Length)
        {
            throw new ArgumentException("At least one result is needed, and an uncertainty for each.", nameof(values));
        }

        // Differences from the first result, so that nearby results keep their digits.
        double weights = 0;
        double sum = 0;
        for (int i = 0; i < values.Length; i++)
        {
            double weight = 1 / (uncertainties[i] * uncertainties[i]);
            weights += weight;
            sum += weight * (values[i] - values[0]);
        }

        double offset = sum / weights;
        double chiSquared = 0;
        for (int i = 0; i < values.Length; i++)
        {
            double ratio = (values[i] - values[0] - offset) / uncertainties[i];
            chiSquared += ratio * ratio;
        }

        return new(values[0] + offset, 1 / Math.Sqrt(weights), chiSquared, values.Length);
    }
}
