using LabWatch.Alerts.LifeCycle;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Heater and thermometer contradict each other. Above the set point, heated and rising needs no knowledge of the source; power with no rise and
/// a rise with no power are told from the energy balance, where the laboratory has stated heat capacity and loss. The numbers are common
/// practice, no source.
/// </summary>
internal sealed class RunawayCheck(AlertKey key, RunawayInputs inputs, HeatBalance balance, Func<long, double> seconds)
    : HazardCheck(key, inputs.Thermometer, inputs.All, TimeSpan.Zero)
{
    /// <summary>Span of the energy balance: long against the lag of a thermometer and the way of the heat to it, seconds.</summary>
    public const double BalanceSeconds = 600;

    private const double AboveSeconds = 180;
    private const double LeastExpectedKelvin = 10;
    private const double LeastRiseKelvin = 5;
    private const double SmallPart = 0.2;
    private const double LargePart = 0.5;
    private const double AboveKelvin = 3;
    private const double AbovePart = 0.01;
    private const double AboveRiseKelvin = 0.5;

    /// <inheritdoc/>
    public override HazardVerdict Judge(long now)
    {
        double celsius = inputs.Thermometer.State.LastValue;
        double watt = inputs.Heater.State.LastValue;
        double setPoint = inputs.SetPoint?.State.LastValue ?? double.NaN;
        bool known = !double.IsNaN(celsius) && !double.IsNaN(watt) && inputs.Thermometer.IsHeardBy(now) && inputs.Heater.IsHeardBy(now);
        if (!known)
        {
            return default;
        }

        double ambient = inputs.Ambient?.State.LastValue ?? double.NaN;
        balance.Add(seconds(now), celsius, watt, double.IsNaN(ambient) ? RunawayInputs.UsualAmbientCelsius : ambient, setPoint);
        HazardVerdict above = Above(setPoint);
        HazardVerdict balanced = balance.IsBalanced ? Balanced() : above with { Present = false, Absent = true };
        return above.Present ? above : balanced.Present ? balanced : above with { Absent = above.Absent && balanced.Absent };
    }

    private HazardVerdict Above(double setPoint)
    {
        double margin = Math.Max(AboveKelvin, AbovePart * Math.Abs(setPoint));
        if (inputs.SetPoint is null)
        {
            return new HazardVerdict(HazardCause.PowerAboveSetPoint, false, true);
        }

        if (balance.Over(AboveSeconds) is not { } span)
        {
            return new HazardVerdict(HazardCause.PowerAboveSetPoint, false, false);
        }

        bool heated = span.MeanWatt >= 2 * SourceHeat.HeatingWattOf(inputs.Heater);
        bool present = heated && span.LeastExcessKelvin >= margin && span.MeasuredKelvin >= AboveRiseKelvin;
        bool absent = !heated || span.LeastExcessKelvin < margin / 2;
        return new HazardVerdict(HazardCause.PowerAboveSetPoint, present, absent, inputs.Thermometer.State.LastValue, setPoint, "Cel", span.MeanWatt);
    }

    private HazardVerdict Balanced()
    {
        if (balance.Over(BalanceSeconds) is not { } span)
        {
            return new HazardVerdict(HazardCause.PowerWithoutRise, false, false);
        }

        bool missing = span.ExpectedKelvin >= LeastExpectedKelvin && span.MeasuredKelvin < SmallPart * span.ExpectedKelvin && span.UnexplainedPart >= LargePart;
        bool tooMuch = span.MeasuredKelvin >= LeastRiseKelvin && span.ExpectedKelvin < SmallPart * span.MeasuredKelvin && Math.Abs(span.UnexplainedPart) >= LargePart;
        bool absent = Math.Abs(span.ExpectedKelvin - span.MeasuredKelvin) < LeastRiseKelvin / 2;
        return new HazardVerdict(
            tooMuch ? HazardCause.RiseWithoutPower : HazardCause.PowerWithoutRise, missing || tooMuch, absent, span.MeasuredKelvin, span.ExpectedKelvin, "K", span.MeanWatt);
    }
}
