using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria.AxialUniformityParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Axial uniformity: how much the calibrated wells of a cavity differ over 30 minutes at one set point, and what that does to its radiance.
/// </summary>
/// <remarks>
/// <para><b>Value.</b> Largest difference between the means of t90 of two wells in the uniform zone of the lab file (all wells where none is
/// stated), after EURAMET Calibration Guide No. 13 (axial homogeneity, by analogy) and CCT-WG5 (2008).</para>
/// <para><b>Input.</b> Raw readings of all wells, the lip, the air and the set point. Wells count that have a certificate in force; one whose
/// certificate is more than three times coarser than the reference's, or that has none, is left out and named.</para>
/// <para><b>Uncertainty of the value.</b> Certificates and scatter of the two wells. What two certificates share (standards, bridge) is on
/// neither; a shared part cancels in the difference, so taking them as independent gives the largest uncertainty that fits them. The common
/// well-to-wall drop cancels.</para>
/// <para><b>Side results.</b> Gradient by least squares over the wells; for each band what the profile adds to effective emissivity and
/// radiance temperature (see <see cref="EffectiveEmissivityCriterion"/>).</para>
/// <para><b>Not decided</b>, with the reason: as for stability (set point unknown or changed, not at it, still approaching); a well that should
/// count gave fewer than 80 % of its readings, changed its certificate or lies outside its range; fewer than two wells; no limit.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
/// <param name="models">Cavity models.</param>
public sealed class AxialUniformityCriterion(CriterionSchedule schedule, ICavityModels models) : ICriterion
{
    /// <summary>Windows of 30 min, one after the other, after 30 min of lead-in, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.AxialUniformity;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return source.Channels.Count(channel => channel.Quantity is ChannelQuantity.WellThermometer) < 2
            ? []
            : [.. AxialReader.Channels(source).Where(id => source.FindChannel(id)!.Band is null && source.FindChannel(id)!.Quantity is not ChannelQuantity.Shutter)];
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ProfileBasis basis = ProfileBasis.Of(input, Schedule, models);
        WellSpread spread = WellSpread.Of(basis.Evidence);
        LimitVerdict verdict = LimitVerdict.Of(
            input, Code, band: null, basis.NominalCelsius, spread.Difference, [("mK", 1000), ("K", 1)], [.. basis.Obstacles, .. spread.Obstacles()]);
        return [new(
            string.Empty,
            verdict.Value,
            verdict.Unit,
            verdict.Limit,
            verdict.Conformity.CoverageFactor,
            verdict.Decision,
            verdict.Probability,
            UniformityFigures.Of(basis, spread, verdict),
            UniformityText.Of(basis, spread, verdict))];
    }
}
