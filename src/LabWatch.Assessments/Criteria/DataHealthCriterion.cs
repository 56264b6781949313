using LabWatch.Assessments.Criteria.DataHealthParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Data health: whether the readings of an hour are there, and are good enough to rest on.
/// </summary>
/// <remarks>
/// <para><b>Source.</b> ISO/IEC 17025:2017, 7.11 (control of data and information management: data are protected against loss, and failures
/// are recorded). How each fault is found is common practice, no source, but for spikes: Hampel identifier (J. Am. Stat. Assoc. 69 (1974) 383).</para>
/// <para><b>Value.</b> Percent of the readings promised by a channel in the window that are missing or bad, of the worst channel on which a
/// result or a hazard rests. With N promised, M missing and B bad among R received: (M + (N - M) B/R)/N. It is a count and has no uncertainty.</para>
/// <para><b>Bad</b> is a reading without a value, outside the range of the sensor (a radiation thermometer that shows that it is out of range
/// excepted), with a device time ahead of the clock, a spike (more than 8 standard deviations from the median of eleven neighbours), or stuck
/// (see <see cref="StuckValue"/>).</para>
/// <para>Of a source that was silent altogether in the lead-in the promise counts from its first reading: it has been put into service, or has come back.</para>
/// <para><b>Not in the value.</b> Lateness is told only by the mark that the intake sets, because no time of arrival is stored: a late reading is as good as
/// another. A second value for the same time is refused before it is stored and lies in the quarantine, which a criterion does not see.
/// A window without any reading is not assessed at all; readiness and the hazard of silence tell of it.</para>
/// <para><b>Decision.</b> Against the limit in force (percent). Only where no limit is in force it is not decided.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class DataHealthCriterion(CriterionSchedule schedule) : ICriterion
{
    private const string Percent = "%";

    /// <summary>Windows of 1 h, a new one every hour, after 30 min of lead-in that shows what is usual, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromHours(1), TimeSpan.FromHours(1), TimeSpan.FromMinutes(30), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.DataHealth;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    /// <remarks>It looks at raw readings.</remarks>
    public bool RestsOnCertificates => false;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return [.. source.Channels.Select(channel => channel.Id)];
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        DataHealthEvidence evidence = DataHealthEvidence.Of(input);
        AcceptanceLimit? limit = LimitLookup.InForce(input.Snapshot, input.Source.Key, Code, double.NaN, band: null, input.Window.End);
        string? obstacle = limit is null ? "no acceptance limit for data health is in force"
            : !string.Equals(limit.Unit, Percent, StringComparison.Ordinal) ? $"the acceptance limit {limit.Id} is given in {limit.Unit}, and a share is given in %"
            : null;
        Estimate value = new(evidence.Worst.LostPercent, 0);
        ConformityResult conformity = Conformity.Decide(
            value, ToleranceInterval.AtMost(limit?.Maximum ?? double.PositiveInfinity), limit?.Rule ?? DecisionRule.SimpleAcceptance);
        Decision decision = obstacle is null ? conformity.Decision : Decision.NotDecided;
        return [new(
            string.Empty, value, Percent, limit, conformity.CoverageFactor, decision, obstacle is null ? conformity.Probability : null,
            DataHealthFigures.Of(evidence), DataHealthText.Of(evidence, limit, obstacle, decision))];
    }
}
