using LabWatch.Simulator.Noise;

namespace LabWatch.Simulator.Sources;

/// <summary>The sensors and readouts of one source: lag, error, drift, noise, resolution, and the comparators' view into the cavity.</summary>
internal sealed class SourceSensors
{
    private const double FrostWarmthKelvinPerKelvin = 0.004;
    private const double SlowNoiseShare = 0.7;
    private const int SlowNoiseSecond = 300;
    private const int ConvectionSecond = 20;
    private const double FullConvectionKelvin = 10;

    private readonly LabHistory _history;
    private readonly long _seed;
    private readonly SourceSimulation _source;
    private readonly HiddenTruth _truth;
    private readonly IReadOnlyList<ChannelDesign> _channels;
    private readonly long[] _streams;
    private readonly double[] _scales;
    private readonly ComparatorView?[] _views;

    /// <summary>Sensors for a source; they start at what they sense.</summary>
    public SourceSensors(LabHistory history, SourceSimulation source)
    {
        _history = history;
        _seed = history.Seed;
        _source = source;
        _truth = source.Truth;
        _channels = source.Design.Channels;
        _streams = [.. _channels.Select(channel => CounterNoise.Stream(source.Design.Id + "/" + channel.Id))];
        _scales = [.. _channels.Select(channel => Math.Pow(10, channel.Decimals))];
        _views = [.. _channels.Select(channel => channel.Role == ChannelRole.Comparator ? new ComparatorView(source, channel) : null)];
        Held = new long?[_channels.Count];
        Lags = new double[_channels.Count];
        for (int i = 0; i < Lags.Length; i++)
        {
            Lags[i] = _channels[i].LagSecond > 0 ? Physical(i, 0) : 0;
        }
    }

    /// <summary>Lagged values by channel.</summary>
    public double[] Lags { get; }

    /// <summary>Values that stuck sensors repeat.</summary>
    public long?[] Held { get; }

    /// <summary>Lets lagged sensors follow by one second and catches the value of a sensor that has just become stuck.</summary>
    public void Step(long second)
    {
        for (int i = 0; i < Lags.Length; i++)
        {
            double lag = _channels[i].LagSecond;
            if (lag > 0)
            {
                Lags[i] += (Physical(i, second) - Lags[i]) / lag;
            }
        }

        bool any = _source.Effects.Stuck.Count > 0;
        for (int i = 0; i < Held.Length; i++)
        {
            if (!any || !_source.Effects.Stuck.Contains(_channels[i].Id))
            {
                Held[i] = null;
            }
            else
            {
                Held[i] ??= Sample(i, second);
            }
        }
    }

    /// <summary>Reads every sensor, in units of its last decimal; null where it is silent.</summary>
    public void Read(long second, Span<long?> values)
    {
        for (int i = 0; i < _channels.Count; i++)
        {
            values[i] = _source.Effects.Silent.Contains(_channels[i].Id) ? null : Held[i] ?? Sample(i, second);
        }
    }

    private long Sample(int index, long second)
    {
        ChannelDesign channel = _channels[index];
        double value = channel.LagSecond > 0 ? Lags[index] : Physical(index, second);
        if (channel.ErrorKelvin > 0)
        {
            value += Error(channel.Id, second);
        }

        double raw = ToRaw(channel, value);
        if (channel.Noise > 0 && !IsTwoState(channel.Role))
        {
            double slow = SlowNoiseShare * CounterNoise.Slow(_seed, _streams[index] + 1, second, SlowNoiseSecond);
            raw += channel.Noise * (CounterNoise.Gaussian(_seed, _streams[index], second) + slow);
        }

        if (channel.Role is ChannelRole.HeaterPower or ChannelRole.PurgeFlow or ChannelRole.CoolingFlow)
        {
            raw = value <= 0 ? 0 : Math.Max(0, raw);
        }

        if (channel.Role == ChannelRole.Comparator && raw < channel.MinimumCelsius)
        {
            raw = channel.UnderRangeCelsius;
        }

        return (long)Math.Round(raw * _scales[index]);
    }

    private double Error(string channel, long second)
    {
        double years = _history.Years(second);
        return _truth.ErrorKelvin[channel] + (_truth.DriftKelvinPerYear[channel] * years) + _source.Effects.Errors.GetValueOrDefault(channel);
    }

    private static double ToRaw(ChannelDesign channel, double value) =>
        channel.Resistance is { } resistance ? resistance.At(value)
        : channel.Role == ChannelRole.Well ? value - channel.KnownErrorKelvin - (channel.ScaleError * value)
        : value;

    private static bool IsTwoState(ChannelRole role) => role is ChannelRole.Shutter or ChannelRole.Cutout or ChannelRole.SetPoint;

    private double Physical(int index, long second)
    {
        ChannelDesign channel = _channels[index];
        SourceNetwork network = _source.Network;
        return channel.Role switch
        {
            ChannelRole.Well => Well(network.WallCelsius(channel.PositionMillimetre)) + Convection(index, second),
            ChannelRole.SetPoint => double.IsNaN(_source.SetPoint) ? 0 : _source.SetPoint,
            ChannelRole.HeaterPower => _source.HeaterWatt,
            ChannelRole.PurgeFlow => _source.PurgeFlow,
            ChannelRole.DewPoint => _source.DewPoint,
            ChannelRole.OuterCase => network.Celsius(network.Case),
            ChannelRole.Lip => network.Celsius(network.Lip),
            ChannelRole.Ambient => _source.AirCelsius,
            ChannelRole.Humidity => _source.RelativeHumidity,
            ChannelRole.Comparator => _views[index]!.RadianceTemperature(Emissivity(channel.Band!, second), FrostWarmthKelvinPerKelvin * _source.Frost),
            ChannelRole.Shutter => _source.ApertureOpen ? 1 : 0,
            ChannelRole.Cutout => _source.Tripped ? 1 : 0,
            ChannelRole.Oxygen => _source.Oxygen,
            ChannelRole.CoolingFlow => 4.2,
            ChannelRole.Stirrer => 720,
            _ => throw new InvalidOperationException($"Channel {channel.Id} senses nothing."),
        };
    }

    private double Well(double wall) => wall + (_truth.WellToWallFraction * (wall - _source.AirCelsius));

    // Eddies around the well, of zero mean and without heat of their own; none where the source is at the temperature of the room.
    private double Convection(int index, long second)
    {
        double share = Math.Min(1, Math.Abs(_source.Network.ControlCelsius - _source.AirCelsius) / FullConvectionKelvin);
        return share * _source.Design.Heat.ConvectionKelvin * CounterNoise.Slow(_seed, _streams[index] + 2, second, ConvectionSecond);
    }

    private double Emissivity(string band, long second)
    {
        double years = _history.Years(second);
        return Math.Clamp(_truth.Emissivity[band] - (_truth.AgeingPerYear * years) - _source.Effects.EmissivityFall, 0.05, 0.999);
    }
}
