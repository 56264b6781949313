namespace LabWatch.Metrology.Cavities;

/// <summary>
/// The weights with which the zones of a cavity enter the radiance that leaves it, for one wall emissivity: radiance = sum w_i L(T_i). Their sum is the isothermal effective
/// emissivity; one minus their sum is the part of the surroundings' radiance that the cavity reflects.
/// </summary>
public sealed class ZoneWeights
{
    private readonly double[] _weights;

    internal ZoneWeights(HitCounts counts, double emissivity, double secondEmissivity, double[] weights, double isothermalComplement, double standardError)
    {
        (Counts, Emissivity, SecondEmissivity) = (counts, emissivity, secondEmissivity);
        (IsothermalComplement, StandardError, _weights) = (isothermalComplement, standardError, weights);
    }

    /// <summary>The counts behind the weights.</summary>
    public HitCounts Counts { get; }

    /// <summary>The wall emissivity.</summary>
    public double Emissivity { get; }

    /// <summary>The emissivity of the second material; the same where there is none.</summary>
    public double SecondEmissivity { get; }

    /// <summary>One minus the isothermal effective emissivity, to full relative precision.</summary>
    public double IsothermalComplement { get; }

    /// <summary>Isothermal effective emissivity.</summary>
    public double Isothermal => 1 - IsothermalComplement;

    /// <summary>Monte Carlo standard error of <see cref="IsothermalComplement"/>; zero for the deterministic methods.</summary>
    public double StandardError { get; }

    /// <summary>The weight of each zone.</summary>
    public ReadOnlySpan<double> Weights => _weights;

    /// <summary>
    /// Derivatives with respect to the wall emissivity: of each weight, and of <see cref="IsothermalComplement"/>. Central differences of the polynomials in the
    /// emissivity, extrapolated (L. F. Richardson, 1911); relative error about 1e-9.
    /// </summary>
    /// <param name="ofSecond">For the emissivity of the second material alone; otherwise of the first, or of all walls where there is one material.</param>
    public (double[] Weights, double IsothermalComplement) Slopes(bool ofSecond = false)
    {
        double at = ofSecond ? SecondEmissivity : Emissivity;
        double step = Math.Min(1e-3, Math.Min(at / 4, (1 - at) / 2));
        if (step <= 0) step = 1e-6;
        (double[] wide, double wideSum) = Difference(ofSecond, at, 2 * step);
        (double[] fine, double fineSum) = Difference(ofSecond, at, step);
        for (int i = 0; i < fine.Length; i++) fine[i] = (4 * fine[i] - wide[i]) / 3;
        return (fine, (4 * fineSum - wideSum) / 3);
    }

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

    private (double[] Weights, double Complement) Difference(bool ofSecond, double at, double step)
    {
        double high = Math.Min(1, at + step), low = at - step;
        ZoneWeights up = At(ofSecond, high), down = At(ofSecond, low);
        double[] slopes = new double[_weights.Length];
        for (int i = 0; i < slopes.Length; i++) slopes[i] = (up._weights[i] - down._weights[i]) / (high - low);
        return (slopes, (up.IsothermalComplement - down.IsothermalComplement) / (high - low));
    }

    private ZoneWeights At(bool ofSecond, double emissivity) => ofSecond
        ? Counts.Weights(Emissivity, emissivity)
        : Counts.Weights(emissivity, Counts.Second == SecondMaterial.None ? emissivity : SecondEmissivity);
}
