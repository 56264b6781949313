using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Stability: how steady the reference thermometer's t90 is over 30 minutes at one set point.
/// </summary>
/// <remarks>
/// <para><b>Value.</b> Half of the difference between the largest and the smallest 10 s mean of t90 in the window (half-range, peak to peak
/// over two), drift included. The 30 min half-range is used by analogy with EURAMET Calibration Guide No. 13 (temperature block calibrators,
/// stability with time); standard deviation and slope as in CCT-WG5 on Radiation Thermometry, uncertainty budgets for calibration of
/// radiation thermometers below the silver point (2008). The sampling belongs to the value: white noise of standard deviation s in the
/// means gives about 2.7 s from 180 means, but only 2.0 s from 30; a limit taken from another sampling must be converted.</para>
/// <para><b>Input.</b> Raw readings of the reference well thermometer and of the set point over the window and the 30 min before it.
/// Readings without a value, and those that the sensor cannot give, are left out and counted.</para>
/// <para><b>Uncertainty of the value</b> (JCGM 100:2008, 5.1.2). The half-range is the difference of two readings of one thermometer, halved,
/// so whatever both share has sensitivity zero: calibration offset, drift since calibration, stem conduction, well-to-wall drop.
/// What counts: sampling of the noise of the window (sensitivity 1, from an autocorrelation-aware bootstrap, degrees of freedom n_eff - 1);
/// resolution d of the readings (each extreme has d/sqrt(12), the half-range d/sqrt(24)); error of the calibration's slope (the two ends of
/// the certificate's range, each u, may err apart: relative sqrt(2) u/range). Not included, because nothing in the data shows them: a shared
/// wander of the bridge or its standard within the window, which would appear as instability of the source.</para>
/// <para><b>Decision.</b> Against the acceptance limit in force for the set point at the end of the window, by the limit's rule
/// (ILAC-G8:09/2019), with the probability of conformity (JCGM 106:2012).</para>
/// <para><b>Not decided</b>, with the reason, where a judgement would be unfair or untraceable: the set point is unknown, or changed in the
/// window or the 30 min before; the source is not at its set point, or was still approaching it; fewer than 80 % of the means; nobody can
/// tell what was before the window; the certificate changed; a reading is outside the certificate's range; no certificate; no limit.
/// A source that leaves its set point is decided (and fails): only an approach is excused.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class StabilityCriterion(CriterionSchedule schedule) : ICriterion
{
    /// <summary>Windows of 30 min, a new one every 10 min, after 30 min of lead-in, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(10), TimeSpan.FromMinutes(30), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.Stability;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return source.ReferenceChannel is not { } reference ? []
            : JunctionTemperatures.With(source, SetPointChannel(source) is { } setPoint ? [reference.Id, setPoint.Id] : [reference.Id]);
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        StabilityEvidence evidence = StabilityEvidence.Of(input, Schedule);
        StabilityValue value = StabilityValue.Of(evidence);
        StabilityVerdict verdict = StabilityVerdict.Of(evidence, value);
        return [new(
            string.Empty,
            value.In(verdict.Unit),
            verdict.Unit,
            verdict.Limit,
            verdict.Conformity.CoverageFactor,
            verdict.Decision,
            verdict.Probability,
            StabilityFigures.Of(evidence, value, verdict),
            StabilityText.Of(evidence, value, verdict))];
    }

    internal static Channel? SetPointChannel(ReferenceSource source) =>
        source.Channels.FirstOrDefault(channel => channel.Quantity is ChannelQuantity.SetPoint);
}
