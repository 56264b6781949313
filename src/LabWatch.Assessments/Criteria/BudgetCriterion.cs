using LabWatch.Assessments.Budgets;
using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Budget: the expanded uncertainty of the source's radiance temperature as it is over 30 minutes, one scope a band, against the calibration and measurement capability (CMC).
/// </summary>
/// <remarks>
/// <para><b>Value.</b> U = k u_c for 95.45 % (JCGM 100:2008, 5.1.2, G.2b, G.3). Measured, or following from what is stated about the source: certificates and scatter of the
/// wells, half-range over sqrt(3), well-to-wall drop, profile up to the lip, coating, diffuse fraction, surroundings, numerical error: the contributions of
/// <see cref="EffectiveEmissivityCriterion"/> to the radiance temperature. Claimed by the lab file, where nothing measures it: all else. What is measured counts, whatever is claimed for it.</para>
/// <para><b>Limit.</b> The CMC, as an acceptance limit of this criterion for a band and a range. A live value may raise the uncertainty that is reported, never lower it below
/// the CMC (ILAC-P14:09/2020).</para>
/// <para><b>Not decided</b>: as for <see cref="AxialUniformityCriterion"/>.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
/// <param name="models">Cavity models.</param>
public sealed class BudgetCriterion(CriterionSchedule schedule, ICavityModels models) : ICriterion
{
    /// <summary>Windows of 30 min, one after the other, after 30 min of lead-in, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.Budget;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return source.Bands.Count == 0 || source.ReferenceChannel is null
            ? []
            : [.. AxialReader.Channels(source).Where(id => source.FindChannel(id)!.Band is null && source.FindChannel(id)!.Quantity is not ChannelQuantity.Shutter)];
    }

    /// <inheritdoc/>
    public string? BandOf(ReferenceSource source, string scope) => scope;

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ProfileBasis basis = ProfileBasis.Of(input, Schedule, models);
        double halfRange = StabilityValue.Of(StabilityEvidence.Of(input, Schedule)).Statistics.HalfRange.Value;
        return [.. basis.Radiances.Select(radiance => Judge(basis, radiance.Band, radiance.Model, radiance.Radiance, halfRange))];
    }

    private CriterionResult Judge(ProfileBasis basis, WorkingBand band, BandModel model, BandRadiance? radiance, double halfRange)
    {
        LiveBudget? budget = radiance is null ? null : LiveBudget.Of(radiance, halfRange, basis.NominalCelsius);
        LimitVerdict verdict = LimitVerdict.Of(
            basis.Input, Code, band.Id, basis.NominalCelsius, budget?.Value ?? Estimate.None, [("mK", 1000), ("K", 1)], [.. basis.Obstacles, .. model.Problems]);
        return new(
            band.Id,
            verdict.Value,
            verdict.Unit,
            verdict.Limit,
            verdict.Conformity.CoverageFactor,
            verdict.Decision,
            verdict.Probability,
            [.. basis.Temperatures(), .. Figures(radiance, budget)],
            budget is null ? VerdictText.Refusal(verdict.Obstacles) + basis.Wells() : BudgetText.Of(band.Id, budget, verdict, basis.Wells()));
    }

    /// <summary>Each line in mK: what counts as <c>u-</c>, with its degrees of freedom, and what is claimed as <c>claimed-</c>.</summary>
    private static IEnumerable<AssessmentFigure> Figures(BandRadiance? radiance, LiveBudget? budget)
    {
        if (radiance is null || budget is null)
        {
            yield break;
        }

        yield return new("radiance-temperature", budget.Combined, "Cel");
        yield return new("effective-emissivity", radiance.EffectiveEmissivity, "/");
        yield return new("isothermal-emissivity", radiance.Isothermal, "/");
        yield return new("surroundings", radiance.Evidence.Surroundings.RadianceCelsius, "Cel");
        yield return new("coverage-factor", new(budget.CoverageFactor, 0), "1");
        if (double.IsFinite(budget.Combined.DegreesOfFreedom))
        {
            yield return new("effective-degrees-of-freedom", new(budget.Combined.DegreesOfFreedom, 0), "1");
        }

        foreach (BudgetLine line in budget.Lines)
        {
            yield return new((line.IsMeasured ? "u-" : "claimed-u-") + line.Name, new(line.U * 1000, 0, line.Kelvin.DegreesOfFreedom), "mK");
            if (double.IsFinite(line.Kelvin.DegreesOfFreedom))
            {
                yield return new("degrees-of-freedom-" + line.Name, new(line.Kelvin.DegreesOfFreedom, 0), "1");
            }

            if (line is { IsMeasured: true, Claimed: { } claim })
            {
                yield return new("claimed-" + line.Name, new(claim.StandardUncertaintyKelvin * 1000, 0, claim.DegreesOfFreedom), "mK");
            }
        }
    }
}
