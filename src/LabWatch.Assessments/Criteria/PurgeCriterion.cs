using LabWatch.Assessments.Criteria.PurgeParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Purge: whether water can settle on the coldest wall of the cavity, and whether a cavity that oxygen damages was hot without its purge.
/// </summary>
/// <remarks>
/// <para><b>Value.</b> Relative humidity of the gas at the aperture at the temperature of the coldest wall, aperture lip included, in percent: e(dew point)/e_sat(wall), over ice where the wall
/// lies below 0 degC (D. Sonntag, Z. Meteorol. 70 (1990) 340-344; WMO-No. 8, annex 4.B). The largest of 5 min means; 100 % is where the first drop or crystal settles.</para>
/// <para><b>Gas.</b> The dew-point sensor at the aperture; where there is none: while the flow is not below the qualified minimum of the lab file, the dew point that this flow was shown to hold;
/// else the dew point of the room from air temperature and relative humidity.</para>
/// <para><b>Fails</b> above the limit; and whatever the limit where the dew or frost point is less than 2 K below the coldest wall (common practice, no source); where a cavity that oxygen damages
/// was above the stated temperature with less than the minimum flow; and after frost (gas saturated at a wall below 0 degC) until the walls stood above 2 degC in dry gas.</para>
/// <para><b>Frost</b> is seen no farther back than the lead-in. A hazard that stands goes farther.</para>
/// <para><b>Uncertainty.</b> Certificates of wall and dew-point sensor; without one 1 K each; of the room 0.5 K and 2 %RH (common practice, no source).</para>
/// <para>No protective device: gas alarms, ventilation and local rules remain in force.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class PurgeCriterion(CriterionSchedule schedule) : ICriterion
{
    /// <summary>Windows of 30 min, one after the other, after 3 h of lead-in in which frost is remembered, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromHours(3), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.Purge;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        bool applies = source.Purge is not null || source.Channels.Any(channel => channel.Quantity is ChannelQuantity.DewPoint);
        return !applies ? [] : JunctionTemperatures.With(source, [.. source.Channels
            .Where(channel => channel.Quantity is ChannelQuantity.WellThermometer or ChannelQuantity.ApertureLip or ChannelQuantity.DewPoint or ChannelQuantity.PurgeFlow
                or ChannelQuantity.AmbientTemperature or ChannelQuantity.RelativeHumidity)
            .Select(channel => channel.Id)]);
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        PurgeRecord record = PurgeRecord.Of(input, Schedule);
        LimitVerdict verdict = LimitVerdict.Of(input, Code, band: null, double.NaN, record.Worst?.Humidity ?? Estimate.None, [("%", 1)], record.Obstacles);
        IReadOnlyList<string> breaches = record.Breaches;
        bool fails = breaches.Count > 0 && verdict.Limit is not null && verdict.Unit == verdict.Limit.Unit;
        return [new(
            string.Empty, verdict.Value, verdict.Unit, verdict.Limit, verdict.Conformity.CoverageFactor, fails ? Decision.Fail : verdict.Decision, fails ? null : verdict.Probability,
            PurgeText.Figures(record), PurgeText.Of(record, verdict, fails))];
    }
}
