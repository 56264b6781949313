using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Budgets;

/// <summary>One line of a live budget.</summary>
/// <param name="Name">What contributes.</param>
/// <param name="Kelvin">Standard uncertainty of the radiance temperature that counts, kelvin, with its degrees of freedom.</param>
/// <param name="Shape">Distribution.</param>
/// <param name="IsMeasured">Whether it is measured over the window or follows from what is stated about the source; else it is claimed.</param>
/// <param name="Claimed">What the laboratory's budget claims for it; null where nothing.</param>
internal sealed record BudgetLine(string Name, Estimate Kelvin, DistributionShape Shape, bool IsMeasured, ClaimedUncertainty? Claimed)
{
    /// <summary>Standard uncertainty, kelvin.</summary>
    public double U => Kelvin.StandardUncertainty;
}
