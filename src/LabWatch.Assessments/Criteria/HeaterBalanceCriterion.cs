using LabWatch.Assessments.Criteria.BalanceParts;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria;

/// <summary>
/// Heater balance: whether the source takes the power that it took, at this temperature, in this room and with this purge, while it was in order.
/// </summary>
/// <remarks>
/// <para><b>Value.</b> Magnitude of the mean over the window of measured less expected heater power, ten-minute means. Expected is the linear regression of the lab file (<c>balances</c>) on the rise above the
/// air, radiation through the aperture (with the shutter open or closed), air temperature, rate, heat stored in the cavity and in the insulation (rise less rise smoothed over 30 and 120 min), and purge flow,
/// learnt from a stated span in which the source was in order.</para>
/// <para><b>What it watches.</b> Insulation, heater, purge, the shutter. It says nothing about the effective emissivity: 0.5 % at 500 degC and 50 mm is 0.2 W.</para>
/// <para><b>Uncertainty.</b> Standard deviation of the residuals learnt from, for the number of blocks and their correlation, and of the prediction. Errors of the power meter and of the thermometers are in the
/// baseline as well and cancel as far as they stay.</para>
/// <para><b>Charts.</b> EWMA (ISO 7870-6) and CUSUM (ISO 7870-4) of the residuals made independent (ISO 7870-9) over the last 18 h; a change is dated with an interval. They tell, and do not decide.</para>
/// <para><b>Not decided</b>: fewer than two blocks that count (set point and shutter unchanged for half an hour, at the set point, inside the temperatures learnt from); the reference was calibrated or exchanged since;
/// no limit.</para>
/// </remarks>
/// <param name="schedule">Which windows to look at; <see cref="DefaultSchedule"/> unless configured.</param>
public sealed class HeaterBalanceCriterion(CriterionSchedule schedule) : ICriterion
{
    private static readonly BalanceJudgement Judgement = new(CriterionCode.HeaterBalance, "Heater power departs from its baseline; the mean departure", "W", [("W", 1), ("mW", 1000)]);

    /// <summary>Windows of 1 h, one after the other, after 23 h of lead-in that hold what the insulation remembers and the charts, 30 s grace.</summary>
    public static CriterionSchedule DefaultSchedule { get; } =
        new(TimeSpan.FromHours(1), TimeSpan.FromHours(1), TimeSpan.FromHours(23), TimeSpan.FromSeconds(30));

    /// <inheritdoc/>
    public string Code => CriterionCode.HeaterBalance;

    /// <inheritdoc/>
    public CriterionSchedule Schedule { get; } = schedule;

    /// <inheritdoc/>
    public IReadOnlyList<string> Channels(ReferenceSource source)
    {
        ArgumentNullException.ThrowIfNull(source);
        return BalanceOf(source) is { } balance ? BalanceBlocks.Channels(source, balance.Channel) : [];
    }

    /// <inheritdoc/>
    public IReadOnlyList<CriterionResult> Evaluate(CriterionInput input)
    {
        ArgumentNullException.ThrowIfNull(input);
        return [Judgement.Of(input, Schedule, BalanceOf(input.Source)!, string.Empty)];
    }

    private static LearntBalance? BalanceOf(ReferenceSource source) =>
        source.Balances.FirstOrDefault(balance => source.FindChannel(balance.Channel) is { Quantity: ChannelQuantity.HeaterPower });
}
