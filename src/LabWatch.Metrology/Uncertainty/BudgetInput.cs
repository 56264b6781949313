namespace LabWatch.Metrology.Uncertainty;

/// <summary>One line of an uncertainty budget.</summary>
/// <param name="Name">What contributes.</param>
/// <param name="Quantity">Best estimate, standard uncertainty and degrees of freedom of the input.</param>
/// <param name="Sensitivity">Derivative of the result by the input.</param>
/// <param name="Shape">Distribution, for Monte Carlo propagation.</param>
public sealed record BudgetInput(
    string Name, Estimate Quantity, double Sensitivity, DistributionShape Shape = DistributionShape.Normal)
{
    /// <summary>Contribution to the result, sensitivity times standard uncertainty, with its sign.</summary>
    public double Contribution => Sensitivity * Quantity.StandardUncertainty;
}
