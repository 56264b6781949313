using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Which checks a source gets: as many as its channels allow. The usual limits stand where the laboratory has laid down none; where no source
/// is named they are common practice.
/// </summary>
internal sealed class HazardChecks
{
    /// <summary>Oxygen below this is a deficient atmosphere: 29 CFR 1910.134(b) (from memory), percent.</summary>
    private const double OxygenPercent = 19.5;

    private const double LeastFlow = 0.1;
    private const double GraphiteHotCelsius = 400;
    private const double HotCelsius = 60;
    private const double FlashPointMarginKelvin = 10;
    private static readonly TimeSpan ShortDelay = TimeSpan.FromSeconds(10);

    private readonly ReferenceSource _source;
    private readonly HazardSource _built;
    private readonly TimeProvider _clock;
    private readonly HazardLimits _limits;
    private readonly HazardChannel[] _thermometers;
    private readonly HazardChannel? _heater;
    private readonly SourceHeat _heat;
    private readonly List<HazardCheck> _checks = [];

    private HazardChecks(ReferenceSource source, HazardSource built, TimeProvider clock)
    {
        _source = source;
        _built = built;
        _clock = clock;
        _limits = source.Hazards;
        _thermometers = [.. All(ChannelQuantity.WellThermometer)];
        _heater = All(ChannelQuantity.HeaterPower).FirstOrDefault();
        _heat = new SourceHeat(_thermometers, _heater, HotCelsius);
    }

    /// <summary>Gives a source its checks; what the ones before remembered is taken over.</summary>
    public static void Put(ReferenceSource source, HazardSource built, HazardSource? before, TimeProvider clock, TimeSpan offDelay)
    {
        HazardChecks maker = new(source, built, clock);
        maker.AddTemperatures();
        maker.AddFlows();
        maker.AddBath();
        maker.AddRoom();
        maker.AddHeater();
        foreach (HazardCheck check in maker._checks)
        {
            check.State = before?.Checks.FirstOrDefault(former => former.Key == check.Key)?.State ?? check.State;
            check.Delays = ConditionDelays.From(check.OnDelay, offDelay, clock);
        }

        foreach (HazardChannel channel in built.Channels)
        {
            HazardCheck[] touched = [.. maker._checks.Where(check => check.Inputs.Contains(channel))];
            channel.OwnChecks = [.. touched.Where(check => check.Inputs.Count == 1)];
            channel.JointChecks = [.. touched.Where(check => check.Inputs.Count > 1)];
        }

        built.Checks = [.. maker._checks];
        built.TickChecks = [.. maker._checks.Where(check => check.OnTicks)];
    }

    private void AddTemperatures()
    {
        double most = _limits.OverTemperatureCelsius ?? _source.MaximumCelsius + Math.Max(10, 0.02 * _source.MaximumCelsius);
        foreach (HazardChannel thermometer in _thermometers)
        {
            Add(thermometer, HazardCode.OverTemperature, HazardCause.OverTemperature, most, above: true, deadBand: 2, TimeSpan.Zero);
        }

        foreach (HazardChannel surface in _built.Channels.Where(channel => channel.Limit is not null))
        {
            Add(surface, HazardCode.ColdSurface, HazardCause.ColdSurface, ColdThreshold.Celsius(surface.Channel.Contact?.ColdLimitCelsius), above: false, deadBand: 2, TimeSpan.Zero);
        }

        if (_thermometers.Length > 0)
        {
            HazardChannel subject = _thermometers.FirstOrDefault(channel => channel.Channel.IsReference) ?? _thermometers[0];
            double minutes = _limits.UnattendedMinutes ?? 240;
            double above = _limits.UnattendedAboveCelsius ?? HotCelsius;
            _checks.Add(new UnattendedCheck(
                Key(HazardCode.UnattendedHot, string.Empty), subject, new SourceHeat(_thermometers, heater: null, above), above,
                ConditionDelays.Ticks(TimeSpan.FromMinutes(minutes), _clock), minutes, () => _built.Attention.Last));
        }
    }

    private void AddFlows()
    {
        foreach (HazardChannel flow in All(ChannelQuantity.CoolingFlow))
        {
            Add(flow, HazardCode.CoolingLost, HazardCause.CoolingLost, _limits.CoolingMinimumLitrePerMinute ?? LeastFlow, above: false, deadBand: 0, ShortDelay, _heat);
        }

        double? hot = _limits.PurgeHotAboveCelsius ?? (_source.Kind == SourceKind.GraphiteTube ? GraphiteHotCelsius : null);
        foreach (HazardChannel flow in hot is null || _thermometers.Length == 0 ? [] : All(ChannelQuantity.PurgeFlow))
        {
            Add(flow, HazardCode.PurgeLost, HazardCause.PurgeLost, _limits.PurgeMinimumLitrePerMinute ?? LeastFlow, above: false, deadBand: 0, ShortDelay,
                new SourceHeat(_thermometers, heater: null, hot!.Value));
        }
    }

    private void AddBath()
    {
        foreach (HazardChannel level in All(ChannelQuantity.BathLevel))
        {
            Add(level, HazardCode.BathFault, HazardCause.BathLevelLow, _limits.BathLevelMinimumPercent ?? 50, above: false, deadBand: 1, ShortDelay);
        }

        foreach (HazardChannel stirrer in All(ChannelQuantity.StirrerSpeed))
        {
            Add(stirrer, HazardCode.BathFault, HazardCause.StirrerStopped, _limits.StirrerMinimumPerMinute ?? 30, above: false, deadBand: 0, ShortDelay, _heat);
        }

        foreach (HazardChannel thermometer in _limits.FlashPointCelsius is null ? [] : _thermometers)
        {
            Add(thermometer, HazardCode.BathFault, HazardCause.FlashPointNear, _limits.FlashPointCelsius!.Value - FlashPointMarginKelvin, above: true, deadBand: 2, TimeSpan.Zero);
        }
    }

    private void AddRoom()
    {
        foreach (HazardChannel oxygen in All(ChannelQuantity.RoomOxygen))
        {
            Add(oxygen, HazardCode.OxygenLow, HazardCause.OxygenLow, _limits.OxygenMinimumPercent ?? OxygenPercent, above: false, deadBand: 0.3, TimeSpan.Zero);
        }

        CondensationInputs inputs = new(
            [.. _thermometers, .. All(ChannelQuantity.ApertureLip)],
            First(ChannelQuantity.DewPoint), First(ChannelQuantity.AmbientTemperature), First(ChannelQuantity.RelativeHumidity), First(ChannelQuantity.PurgeFlow),
            _limits.PurgeMinimumLitrePerMinute ?? double.NaN);
        if (inputs.Walls.Count > 0 && (inputs.DewPoint is not null || (inputs.Ambient is not null && inputs.Humidity is not null)))
        {
            _checks.Add(new CondensationCheck(Key(HazardCode.Condensation, inputs.Subject.Channel.Id), inputs, _limits.CondensationMarginKelvin ?? 2));
        }
    }

    private void AddHeater()
    {
        foreach (HazardChannel cutout in All(ChannelQuantity.OverTemperatureCutout))
        {
            Add(cutout, HazardCode.CutoutTripped, HazardCause.CutoutTripped, 0.5, above: true, deadBand: 0, TimeSpan.Zero);
        }

        if (_heater is null || _thermometers.FirstOrDefault(channel => channel.Channel.IsReference) is not { } reference)
        {
            return;
        }

        RunawayInputs inputs = new(reference, _heater, First(ChannelQuantity.SetPoint), First(ChannelQuantity.AmbientTemperature));
        HeatBalance balance = new(_limits.HeatCapacityJoulePerKelvin ?? double.NaN, _limits.LossWattPerKelvin ?? double.NaN, RunawayCheck.BalanceSeconds);
        _checks.Add(new RunawayCheck(Key(HazardCode.HeaterRunaway, reference.Channel.Id), inputs, balance, stamp => (double)stamp / _clock.TimestampFrequency));
    }

    private void Add(
        HazardChannel channel, string code, HazardCause cause, double limit, bool above, double deadBand, TimeSpan onDelay, SourceHeat? heat = null) =>
        _checks.Add(new ThresholdCheck(Key(code, channel.Channel.Id), channel, cause, limit, above, deadBand, onDelay, heat));

    private AlertKey Key(string code, string subject) => new(_source.Key, code, subject);

    private IEnumerable<HazardChannel> All(ChannelQuantity quantity) => _built.Channels.Where(channel => channel.Channel.Quantity == quantity);

    private HazardChannel? First(ChannelQuantity quantity) => All(quantity).FirstOrDefault();
}
