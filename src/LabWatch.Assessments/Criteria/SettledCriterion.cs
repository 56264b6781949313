using LabWatch.Assessments.Criteria.SettledParts;
using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Settled: whether the source has come to rest at its set point, and if it has not after a change of set point, when it can be expected to.
/// </summary>
/// <remarks>
/// <para><b>Value.</b> Magnitude of the least-squares slope of the minute means of the reference thermometer's t90 over the window, with a standard error that allows for autocorrelated noise
/// (see <see cref="SlopeError"/>).</para>
/// <para><b>Steady state.</b> R-statistic of S. Cao and R. R. Rhinehart, J. Process Control 5 (1995) 363-374, on the last 30 readings thinned to three correlation times of the window's noise, at most a minute (factors 0.2, 0.1,
/// 0.1), since the set point is as it is; steady below the value that a steady source stays below with a probability of 99 %. It has to be shown where the set point changed within window or
/// lead-in; later it is told: what the control does for ever is for the stability to judge.</para>
/// <para><b>Set point.</b> Within 2 K, or 1 % of its distance from 23 degC where that is more.</para>
/// <para><b>Time to settle.</b> The slope of an exponential approach falls with its time constant tau: from the slopes of both halves of the window tau = (T/2)/ln(s1/s2), and the slope is within the limit after
/// tau ln(s/limit). The interval comes from slopes at the ends of their expanded uncertainties, and is not narrower than the time until the distance is within tolerance.</para>
/// <para><b>Decision.</b> Against the limit in force for the set point (mK/h or K/h). A source passes as soon as it is settled, also shortly after a change of set point. While it is not and the set point changed within
/// the window or its lead-in, or while it comes nearer from afar, it is not decided: it is on its way. A source that has had the whole lead-in and moves at its set point, or leaves it, is decided, and fails.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class SettledCriterion(CriterionSchedule schedule) : ICriterion
{
    /// <summary>Windows of 20 min, a new one every 10 min, after 100 min of lead-in, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromMinutes(20), TimeSpan.FromMinutes(10), TimeSpan.FromMinutes(100), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.Settled;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    /// <remarks>A source without a set point cannot be away from it.</remarks>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return source.ReferenceChannel is { } reference && StabilityCriterion.SetPointChannel(source) is { } setPoint
            ? JunctionTemperatures.With(source, [reference.Id, setPoint.Id])
            : [];
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        StabilityEvidence evidence = StabilityEvidence.Of(input, Schedule);
        RestState state = RestState.Of(evidence);
        SettledVerdict verdict = SettledVerdict.Of(evidence, state);
        return [new(
            string.Empty, verdict.Limit.Value, verdict.Limit.Unit, verdict.Limit.Limit, verdict.Limit.Conformity.CoverageFactor, verdict.Limit.Decision, verdict.Limit.Probability,
            SettledText.Figures(evidence, state, verdict), SettledText.Of(evidence, state, verdict))];
    }
}
