using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Thermometry;

/// <summary>
/// Resistance at zero power from measurements at two currents: R0 = R1 - (R2 - R1) I1^2 / (I2^2 - I1^2)
/// (Guide to the Realization of the ITS-90, platinum resistance thermometry; formula from memory).
/// </summary>
public static class ZeroPower
{
    /// <summary>Extrapolates; independent uncertainties are propagated, degrees of freedom by Welch-Satterthwaite.</summary>
    /// <param name="resistance1">Resistance at the first current, ohm.</param>
    /// <param name="current1">First current, any unit.</param>
    /// <param name="resistance2">Resistance at the second current, ohm.</param>
    /// <param name="current2">Second current in the same unit; its magnitude differs from the first.</param>
    public static Estimate Extrapolate(Estimate resistance1, double current1, Estimate resistance2, double current2)
    {
        double share = current1 * current1 / ((current2 * current2) - (current1 * current1));
        double u1 = (1 + share) * resistance1.StandardUncertainty;
        double u2 = share * resistance2.StandardUncertainty;
        return new(
            resistance1.Value - ((resistance2.Value - resistance1.Value) * share),
            double.Hypot(u1, u2),
            EffectiveDegreesOfFreedom.Of([(u1, resistance1.DegreesOfFreedom), (u2, resistance2.DegreesOfFreedom)]));
    }
}
