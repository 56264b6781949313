using LabWatch.Assessments.Criteria.BalanceParts;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Agreement of the references: whether redundant thermometers still differ from the reference as they did, against their repeatability. One scope a thermometer.
/// </summary>
/// <remarks>
/// <para><b>Value.</b> Magnitude of the mean over the window of (thermometer less reference) less what is expected of it, ten-minute means. Expected is the linear regression of the lab file (<c>balances</c>), learnt
/// from a stated span in which both were known to be right: thermometers in different wells differ by the gradient of the cavity, which follows temperature, room and shutter.</para>
/// <para><b>Against repeatability.</b> The uncertainty is that of the residuals learnt from. Certificates do not enter: thermometers that share a calibration or a bridge agree by En whatever both have drifted by, and two
/// independent ones may differ by their U and still both stand. What departs here has moved since the baseline; which of the two, a third or a fixed point tells.</para>
/// <para><b>Charts</b>, <b>not decided</b>: as for <see cref="HeaterBalanceCriterion"/>.</para>
/// <para><b>Source.</b> ISO/IEC 17025:2017, 7.7.1 (ensuring the validity of results: functional and intermediate checks, replicate measurements); ILAC-G24; ISO 7870-4, -6, -9.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class ReferenceAgreementCriterion(CriterionSchedule schedule) : ICriterion
{
    private static readonly BalanceJudgement Judgement = new(
        CriterionCode.ReferenceAgreement, "Its difference from the reference departs from the baseline; the mean departure", "K", [("mK", 1000), ("K", 1)]);

    /// <summary>Windows of 1 h, one after the other, after 23 h of lead-in that hold what the insulation remembers and the charts, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromHours(1), TimeSpan.FromHours(1), TimeSpan.FromHours(23), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.ReferenceAgreement;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return [.. BalancesOf(source).SelectMany(balance => BalanceBlocks.Channels(source, balance.Channel)).Distinct()];
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        return [.. BalancesOf(input.Source).Select(balance => Judgement.Of(input, Schedule, balance, balance.Channel))];
    }

    private static IEnumerable<LearntBalance> BalancesOf(ReferenceSource source) =>
        source.Balances.Where(balance => source.FindChannel(balance.Channel) is { Quantity: ChannelQuantity.WellThermometer });
}
