using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria.EffectiveEmissivityParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Effective emissivity: how far it has moved from its baseline, by the model of the cavity with its live temperature profile (one scope a
/// band), and by each comparator that looks into the source (one scope a comparator, named by its channel).
/// </summary>
/// <remarks>
/// <para><b>Value.</b> |e_eff - baseline|, a pure number. The baseline is that of the lab file for the band whose set point is nearest; where there is none,
/// the design value: the isothermal e_eff with the stated optics.</para>
/// <para><b>Model.</b> e_eff = sum of w_i L(T_i)/L(T_ref) over the zones of the cavity, w from one trace of geometry, view and diffuse fraction: ring
/// kernels for diffuse walls (E. M. Sparrow and co-workers 1960-62; R. E. Bedford and C. K. Ma 1974), else backward Monte Carlo. T_ref is the reference well.
/// Uncertainty: emissivity of the coating, diffuse fraction, each well, well-to-wall drop, lip and the shape up to it, surroundings, zones, method.
/// Where the design value is the baseline, what both share cancels.</para>
/// <para><b>Comparator.</b> See <see cref="ComparatorEmissivity"/>. Refused, with the reason: no certificate, shutter closed, under-range or
/// saturated, outside its certificate; and where U(e_eff) is above the limit, as near room temperature. One that was calibrated against this very
/// source shows change only.</para>
/// <para><b>Not decided</b>: as for <see cref="AxialUniformityCriterion"/>.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
/// <param name="models">Cavity models.</param>
public sealed class EffectiveEmissivityCriterion(CriterionSchedule schedule, ICavityModels models) : ICriterion
{
    /// <summary>Windows of 30 min, one after the other, after 30 min of lead-in, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.EffectiveEmissivity;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return source.Bands.Count > 0 && source.Channels.Any(channel => channel.Quantity is ChannelQuantity.WellThermometer) ? AxialReader.Channels(source) : [];
    }

    /// <inheritdoc/>
    public string? BandOf(ReferenceSource source, string scope)
    {
        ArgumentNullException.ThrowIfNull(source);
        return source.Bands.Any(band => string.Equals(band.Id, scope, StringComparison.Ordinal)) ? scope : source.FindChannel(scope)?.Band;
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ProfileBasis basis = ProfileBasis.Of(input, Schedule, models);
        List<CriterionResult> results = [];
        foreach ((WorkingBand band, BandModel model, BandRadiance? radiance) in basis.Radiances)
        {
            results.Add(ModelJudgement.Of(basis, band, model, radiance));
            foreach (ComparatorPoint comparator in basis.Evidence.Comparators.Where(point => string.Equals(point.Channel.Band, band.Id, StringComparison.Ordinal)))
            {
                results.Add(ComparatorJudgement.Of(basis, band, model, radiance, comparator));
            }
        }

        return results;
    }
}
