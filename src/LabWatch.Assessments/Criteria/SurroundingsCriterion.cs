using LabWatch.Assessments.Criteria.SurroundingsParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Surroundings: whether the room stayed inside the conditions that the uncertainty budget of the source holds for.
/// </summary>
/// <remarks>
/// <para><b>Source.</b> ISO/IEC 17025:2017, 6.3 (facilities and environmental conditions: monitored, recorded, and activities stopped where they put results in doubt).</para>
/// <para><b>Value.</b> For each of air temperature, relative humidity and air pressure with a permitted range in the lab file (<c>conditions</c>): the largest distance of a 5 min mean
/// from the middle of the range, in percent of half its width; of these the largest. 100 % is the edge of the range, so that one limit serves all.</para>
/// <para><b>Uncertainty.</b> Certificate of the sensor; without one 0.5 K, 2 %RH, 100 Pa (common practice, no source).</para>
/// <para><b>Background.</b> The radiance of what the cavity reflects is the air temperature with the offset that the lab file states; it moves with the air.</para>
/// <para><b>Not decided</b>: a condition with a permitted range that nothing measures, or that has no readings in the window; no limit.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class SurroundingsCriterion(CriterionSchedule schedule) : ICriterion
{
    /// <summary>Windows of 30 min, one after the other, 30 s grace; the lead-in of a minute is not judged.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(30), TimeSpan.FromMinutes(1), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.Surroundings;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return [.. RoomCondition.All.Where(kind => kind.Permitted(source) is not null).Select(kind => kind.ChannelOf(source)).OfType<Channel>().Select(channel => channel.Id)];
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        IReadOnlyList<RoomDeparture> departures = RoomDeparture.Of(input);
        RoomDeparture? worst = departures.Where(departure => departure.Percent.HasValue).MaxBy(departure => departure.Percent.Value);
        LimitVerdict verdict = LimitVerdict.Of(
            input, Code, band: null, double.NaN, worst?.Percent ?? new(double.NaN, double.NaN), [("%", 1)], departures.Select(departure => departure.Obstacle).OfType<string>());
        return [new(
            string.Empty, verdict.Value, verdict.Unit, verdict.Limit, verdict.Conformity.CoverageFactor, verdict.Decision, verdict.Probability,
            [.. departures.SelectMany(departure => departure.Figures())], RoomDeparture.Text(departures, worst, verdict))];
    }
}
