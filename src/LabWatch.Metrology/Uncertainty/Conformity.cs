namespace LabWatch.Metrology.Uncertainty;

/// <summary>Decisions on conformity with a tolerance: JCGM 106:2012 and ILAC-G8:09/2019.</summary>
public static class Conformity
{
    /// <summary>
    /// Decides on a value. Simple acceptance compares the value alone; the guard band w = r U gives the four words of ILAC-G8:09/2019, 4.2.3.
    /// Not decided where there is no value, or where a guard band is asked for and the uncertainty is unknown.
    /// </summary>
    /// <param name="value">The value; magnitudes belong with a one-sided tolerance, signed deviations with a two-sided one.</param>
    /// <param name="tolerance">What is permitted.</param>
    /// <param name="rule">How to decide.</param>
    /// <param name="guardBandMultiple">r in w = r U; 1 in the usual rule, 0 is simple acceptance.</param>
    /// <param name="coverageProbability">Coverage probability of U.</param>
    public static ConformityResult Decide(
        Estimate value,
        ToleranceInterval tolerance,
        DecisionRule rule,
        double guardBandMultiple = 1,
        double coverageProbability = Uncertainty.CoverageFactor.DefaultProbability)
    {
        double factor = Uncertainty.CoverageFactor.For(value.DegreesOfFreedom, coverageProbability);
        double expanded = value.StandardUncertainty == 0 ? 0 : factor * value.StandardUncertainty;
        double guardBand = rule == DecisionRule.GuardBand ? guardBandMultiple * expanded : 0;
        return new(DecisionOn(value.Value, tolerance, guardBand), Probability(value, tolerance), factor, expanded, guardBand);
    }

    /// <summary>
    /// Probability that the true value lies in the tolerance, from a normal or, with finite degrees of freedom, a scaled and shifted t distribution
    /// (JCGM 106:2012, 7.2 to 7.4). With zero uncertainty it is 0 or 1; NaN where value or uncertainty is unknown.
    /// </summary>
    public static double Probability(Estimate value, ToleranceInterval tolerance) => 1 - NonconformityProbability(value, tolerance);

    /// <summary>
    /// One minus <see cref="Probability"/>, with full relative accuracy where it is small: the specific risk of a value that was accepted.
    /// </summary>
    public static double NonconformityProbability(Estimate value, ToleranceInterval tolerance)
    {
        double u = value.StandardUncertainty;
        if (!value.HasValue || !(u >= 0))
        {
            return double.NaN;
        }

        if (u == 0)
        {
            return tolerance.Contains(value.Value) ? 0 : 1;
        }

        return StudentDistribution.UpperTail((tolerance.Upper - value.Value) / u, value.DegreesOfFreedom)
            + StudentDistribution.UpperTail((value.Value - tolerance.Lower) / u, value.DegreesOfFreedom);
    }

    private static Decision DecisionOn(double value, ToleranceInterval tolerance, double guardBand)
    {
        if (!double.IsFinite(value) || !double.IsFinite(guardBand))
        {
            return Decision.NotDecided;
        }

        if (tolerance.Contains(value))
        {
            return tolerance.Guarded(guardBand).Contains(value) ? Decision.Pass : Decision.ConditionalPass;
        }

        return guardBand > 0 && tolerance.Guarded(-guardBand).Contains(value) ? Decision.ConditionalFail : Decision.Fail;
    }
}
