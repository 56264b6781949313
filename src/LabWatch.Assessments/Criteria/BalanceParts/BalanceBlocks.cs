using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Criteria.BalanceParts;

/// <summary>A source as ten-minute means: what a balance predicts, and what it predicts from.</summary>
internal sealed class BalanceBlocks
{
    /// <summary>Length of a block.</summary>
    public static readonly TimeSpan Length = TimeSpan.FromMinutes(10);

    /// <summary>Blocks for which set point and shutter have to have been as they are.</summary>
    private const int Unchanged = 3;
    private const double AirCentreCelsius = 23;
    private const double IceKelvin = 273.15;
    private const double StefanBoltzmannKilowatt = 5.670374419e-11;
    private const double SameShutter = 0.01;
    private static readonly double ShortKept = Math.Exp(-Length / TimeSpan.FromMinutes(30));
    private static readonly double LongKept = Math.Exp(-Length / TimeSpan.FromMinutes(120));

    private readonly double[] _observed;
    private readonly double[] _celsius;
    private readonly double[] _air;
    private readonly double[] _setPoint;
    private readonly double[] _shutter;
    private readonly double[] _flow;
    private readonly double[] _short;
    private readonly double[] _long;

    private BalanceBlocks(TimeWindow span, double[] observed, double[] celsius, double[] air, double[]? setPoint, double[]? shutter, double[]? flow)
    {
        (Span, _observed, _celsius, _air) = (span, observed, celsius, air);
        HasSetPoint = setPoint is not null;
        HasShutter = shutter is not null;
        HasFlow = flow is not null;
        _setPoint = setPoint ?? [];
        _shutter = shutter ?? [];
        _flow = flow ?? [];
        _short = Smoothed(ShortKept);
        _long = Smoothed(LongKept);
    }

    /// <summary>What the blocks fill.</summary>
    public TimeWindow Span { get; }

    /// <summary>Number of blocks.</summary>
    public int Count => _observed.Length;

    public bool HasSetPoint { get; }

    public bool HasShutter { get; }

    public bool HasFlow { get; }

    /// <summary>Ids of the channels that a balance is read from; empty where it cannot be.</summary>
    public static IReadOnlyList<string> Channels(ReferenceSource source, string channel)
    {
        Channel? air = First(source, ChannelQuantity.AmbientTemperature);
        return source.ReferenceChannel is not { } reference || air is null || source.FindChannel(channel) is null
            ? []
            : JunctionTemperatures.With(source, [.. new[]
                {
                    channel, reference.Id, air.Id, First(source, ChannelQuantity.SetPoint)?.Id, First(source, ChannelQuantity.Shutter)?.Id, First(source, ChannelQuantity.PurgeFlow)?.Id,
                }.OfType<string>()]);
    }

    /// <summary>Reads the blocks of a span.</summary>
    /// <param name="snapshot">What is configured.</param>
    /// <param name="source">The source.</param>
    /// <param name="channel">Channel of the balance: heater power, or a well thermometer whose difference from the reference is meant.</param>
    /// <param name="span">A span of whole blocks.</param>
    /// <param name="readings">Readings over the span.</param>
    public static BalanceBlocks Of(LabSnapshot snapshot, ReferenceSource source, Channel channel, TimeWindow span, ReadingWindow readings)
    {
        double[] Means(Channel one) => BlockMeans.Of(snapshot, one, span, Length, readings).Means;
        double[]? Optional(ChannelQuantity quantity) => First(source, quantity) is { } one ? Means(one) : null;
        double[] celsius = Means(source.ReferenceChannel!);
        double[] observed = Means(channel);
        double factor = channel.Unit == "kW" ? 1000 : 1;
        for (int i = 0; i < observed.Length; i++)
        {
            observed[i] = channel.Quantity is ChannelQuantity.WellThermometer ? observed[i] - celsius[i] : observed[i] * factor;
        }

        return new(
            span, observed, celsius, Means(First(source, ChannelQuantity.AmbientTemperature)!), Optional(ChannelQuantity.SetPoint), Optional(ChannelQuantity.Shutter), Optional(ChannelQuantity.PurgeFlow));
    }

    /// <summary>Blocks of parts that follow one another.</summary>
    public static BalanceBlocks Join(IReadOnlyList<BalanceBlocks> parts) => new(
        new(parts[0].Span.Start, parts[^1].Span.End),
        [.. parts.SelectMany(part => part._observed)],
        [.. parts.SelectMany(part => part._celsius)],
        [.. parts.SelectMany(part => part._air)],
        parts[0].HasSetPoint ? [.. parts.SelectMany(part => part._setPoint)] : null,
        parts[0].HasShutter ? [.. parts.SelectMany(part => part._shutter)] : null,
        parts[0].HasFlow ? [.. parts.SelectMany(part => part._flow)] : null);

    /// <summary>Time of the middle of a block.</summary>
    public Instant At(int block) => Span.Start + (block * Length) + (Length / 2);

    /// <summary>What was measured in a block, W or K.</summary>
    public double Observed(int block) => _observed[block];

    /// <summary>Reference temperature of a block.</summary>
    public double Celsius(int block) => _celsius[block];

    /// <summary>Whether a block counts: everything known, at a set point that has not changed for half an hour, the shutter open or closed throughout and as long.</summary>
    public bool IsUsable(int block)
    {
        if (block < Unchanged || !double.IsFinite(_observed[block] + _celsius[block] + _celsius[block - 1] + _air[block]) || (HasFlow && !double.IsFinite(_flow[block])))
        {
            return false;
        }

        for (int back = 0; HasSetPoint && back <= Unchanged; back++)
        {
            if (!(Math.Abs(_setPoint[block - back] - _setPoint[block]) <= SetPointHistory.SameWithinKelvin))
            {
                return false;
            }
        }

        for (int back = 0; HasShutter && back <= Unchanged; back++)
        {
            double open = _shutter[block - back];
            if (!(Math.Abs(open - Math.Round(_shutter[block])) <= SameShutter))
            {
                return false;
            }
        }

        return !HasSetPoint || Math.Abs(_celsius[block] - _setPoint[block]) <= StabilityObstacles.AtTemperatureKelvin(_setPoint[block]);
    }

    /// <summary>What a term is proportional to in a block.</summary>
    public double Term(BalanceTermKind kind, int block) => kind switch
    {
        BalanceTermKind.Constant => 1,
        BalanceTermKind.Rise => Rise(block),
        BalanceTermKind.Radiation => Radiation(block),
        BalanceTermKind.RadiationOpen => HasShutter ? Radiation(block) * Math.Round(_shutter[block]) : Radiation(block),
        BalanceTermKind.Air => _air[block] - AirCentreCelsius,
        BalanceTermKind.Rate => (_celsius[block] - _celsius[block - 1]) / Length.TotalHours,
        BalanceTermKind.ShortLag => Rise(block) - _short[block],
        BalanceTermKind.LongLag => Rise(block) - _long[block],
        BalanceTermKind.PurgeFlow => (HasFlow ? _flow[block] : 0) * Rise(block),
        _ => throw new ArgumentOutOfRangeException(nameof(kind), kind, null),
    };

    private static Channel? First(ReferenceSource source, ChannelQuantity quantity) => source.Channels.FirstOrDefault(channel => channel.Quantity == quantity);

    private double Rise(int block) => (_celsius[block] - _air[block]) / 100;

    private double Radiation(int block) => StefanBoltzmannKilowatt * (Math.Pow(_celsius[block] + IceKelvin, 4) - Math.Pow(_air[block] + IceKelvin, 4));

    private double[] Smoothed(double kept)
    {
        double[] smoothed = new double[Count];
        double value = double.NaN;
        for (int i = 0; i < Count; i++)
        {
            double rise = Rise(i);
            value = double.IsNaN(value) ? rise : double.IsNaN(rise) ? value : (kept * value) + ((1 - kept) * rise);
            smoothed[i] = value;
        }

        return smoothed;
    }
}
