namespace LabWatch.Metrology.Cavities;

/// <summary>
/// The weights with which the zones of a cavity enter the radiance that leaves it, for one wall emissivity: radiance = sum w_i L(T_i). Their sum is the isothermal effective
/// emissivity; one minus their sum is the part of the surroundings' radiance that the cavity reflects.
/// </summary>
public sealed class ZoneWeights
{
    private readonly double[] _weights;
    private readonly double[] _slopes;

    internal ZoneWeights(HitCounts counts, double emissivity, double[] weights, double[] slopes, double isothermalComplement, double standardError)
    {
        (Counts, Emissivity, IsothermalComplement, StandardError) = (counts, emissivity, isothermalComplement, standardError);
        (_weights, _slopes) = (weights, slopes);
    }

    /// <summary>The counts behind the weights.</summary>
    public HitCounts Counts { get; }

    /// <summary>The wall emissivity.</summary>
    public double Emissivity { get; }

    /// <summary>One minus the isothermal effective emissivity, to full relative precision.</summary>
    public double IsothermalComplement { get; }

    /// <summary>Isothermal effective emissivity.</summary>
    public double Isothermal => 1 - IsothermalComplement;

    /// <summary>Monte Carlo standard error of <see cref="IsothermalComplement"/>; zero for the deterministic methods.</summary>
    public double StandardError { get; }

    /// <summary>The weight of each zone.</summary>
    public ReadOnlySpan<double> Weights => _weights;

    /// <summary>Derivative of each weight with respect to the wall emissivity; the sum of them is that of the isothermal effective emissivity.</summary>
    public ReadOnlySpan<double> WeightSlopes => _slopes;

    /// <summary>
    /// One minus the effective emissivity of a cavity that is not isothermal. No allocation.
    /// </summary>
    /// <param name="radianceDeficits">For each zone 1 - L(T_i)/L(T_ref) in the band: zero at the reference temperature, positive where the zone is colder.</param>
    public double Complement(ReadOnlySpan<double> radianceDeficits)
    {
        if (radianceDeficits.Length != _weights.Length) throw new ArgumentException("One value for each zone is needed.", nameof(radianceDeficits));
        double sum = IsothermalComplement;
        for (int i = 0; i < _weights.Length; i++) sum += _weights[i] * radianceDeficits[i];
        return sum;
    }
}
