using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Budgets;

/// <summary>The uncertainty of a source's radiance temperature in one band over one window.</summary>
/// <param name="Lines">The lines, the measured ones first.</param>
/// <param name="Combined">Radiance temperature in degree Celsius with the combined standard uncertainty and effective degrees of freedom (JCGM 100:2008, 5.1.2, G.2b).</param>
internal sealed record LiveBudget(IReadOnlyList<BudgetLine> Lines, Estimate Combined)
{
    /// <summary>Coverage factor for 95.45 %.</summary>
    public double CoverageFactor => Metrology.Uncertainty.CoverageFactor.For(Combined.DegreesOfFreedom);

    /// <summary>Expanded uncertainty, kelvin.</summary>
    public double Expanded => CoverageFactor * Combined.StandardUncertainty;

    /// <summary>The expanded uncertainty as a value; a standard uncertainty with v degrees of freedom is itself uncertain by u/sqrt(2 v) (JCGM 100:2008, E.4.3).</summary>
    public Estimate Value => new(
        Expanded, double.IsFinite(Combined.DegreesOfFreedom) ? Expanded / Math.Sqrt(2 * Combined.DegreesOfFreedom) : 0, double.PositiveInfinity);

    /// <summary>The line with the largest contribution.</summary>
    public BudgetLine Largest => Lines.MaxBy(line => line.U)!;

    /// <summary>Share of a line in the combined variance.</summary>
    public double ShareOf(BudgetLine line) => Combined.StandardUncertainty > 0 ? line.U * line.U / (Combined.StandardUncertainty * Combined.StandardUncertainty) : 0;

    /// <summary>Puts a budget together.</summary>
    /// <param name="radiance">The radiance in the band.</param>
    /// <param name="halfRange">Half-range over the window, kelvin; NaN where unknown.</param>
    /// <param name="nominalCelsius">Set point.</param>
    public static LiveBudget Of(BandRadiance radiance, double halfRange, double nominalCelsius)
    {
        ReferenceSource source = radiance.Evidence.Source;
        string band = radiance.Model.Band.Id;
        ClaimedUncertainty[] claimed = [.. source.Claimed.Where(claim => claim.AppliesTo(band, nominalCelsius))];
        List<BudgetLine> lines = [];
        foreach ((string name, Estimate kelvin, DistributionShape shape) in Measured(radiance, halfRange))
        {
            ClaimedUncertainty? claim = claimed.FirstOrDefault(candidate => candidate.Contribution == name);
            if (double.IsFinite(kelvin.StandardUncertainty))
            {
                lines.Add(new(name, kelvin, shape, true, claim));
            }
            else if (claim is not null)
            {
                lines.Add(Claim(claim));
            }
        }

        lines.AddRange(claimed.Where(claim => lines.All(line => line.Name != claim.Contribution)).Select(Claim));
        UncertaintyBudget budget = new([.. lines.Select(line => new BudgetInput(line.Name, line.Kelvin, 1, line.Shape))], null, radiance.RadianceCelsius.Value);
        return new(lines, budget.Combined);
    }

    private static BudgetLine Claim(ClaimedUncertainty claim) =>
        new(claim.Contribution, new(0, claim.StandardUncertaintyKelvin, claim.DegreesOfFreedom), claim.Shape, false, claim);

    private static IEnumerable<(string Name, Estimate Kelvin, DistributionShape Shape)> Measured(BandRadiance radiance, double halfRange)
    {
        yield return (ContributionName.Wells, Of(radiance, ContributionKind.Well), DistributionShape.Normal);
        // The instrument under calibration is read at any moment of the window: rectangular between the extremes.
        yield return (ContributionName.Stability, new(0, halfRange / Math.Sqrt(3)), DistributionShape.Rectangular);
        yield return (ContributionName.WellToWall, Of(radiance, ContributionKind.WellToWall), DistributionShape.Normal);
        yield return (ContributionName.Lip, Of(radiance, ContributionKind.Lip, ContributionKind.LipShape), DistributionShape.Normal);
        yield return (ContributionName.Emissivity, Of(radiance, ContributionKind.Emissivity, ContributionKind.SecondEmissivity), DistributionShape.Normal);
        yield return (ContributionName.DiffuseFraction, Of(radiance, ContributionKind.DiffuseFraction), DistributionShape.Normal);
        yield return (ContributionName.Surroundings, Of(radiance, ContributionKind.Surroundings), DistributionShape.Normal);
        yield return (ContributionName.Numerical, Of(radiance, ContributionKind.Discretisation, ContributionKind.Method), DistributionShape.Normal);
    }

    private static Estimate Of(BandRadiance radiance, params ReadOnlySpan<ContributionKind> kinds)
    {
        List<Contribution> chosen = [];
        foreach (Contribution contribution in radiance.Contributions)
        {
            if (kinds.Contains(contribution.Input))
            {
                chosen.Add(contribution);
            }
        }

        return (radiance with { Contributions = chosen }).Combine(0, static change => change.RadianceKelvin);
    }
}
