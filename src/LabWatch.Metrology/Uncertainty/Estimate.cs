namespace LabWatch.Metrology.Uncertainty;

/// <summary>
/// The estimate of a quantity with its standard uncertainty and effective degrees of freedom, as in JCGM 100:2008 (GUM), clauses 3.3 and G.4.
/// Both numbers are in the unit that the member holding the estimate names.
/// </summary>
/// <param name="Value">Best estimate; NaN where there is none.</param>
/// <param name="StandardUncertainty">Standard uncertainty, zero or positive; NaN where unknown.</param>
/// <param name="DegreesOfFreedom">Effective degrees of freedom, positive; positive infinity where the uncertainty is taken as exactly known.</param>
public readonly record struct Estimate(double Value, double StandardUncertainty, double DegreesOfFreedom = double.PositiveInfinity)
{
    /// <summary>An estimate without a value: every member is NaN.</summary>
    public static Estimate None { get; } = new(double.NaN, double.NaN, double.NaN);

    /// <summary>Whether there is a finite value.</summary>
    public bool HasValue => double.IsFinite(Value);
}
