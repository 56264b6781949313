using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>
/// The temperature of a thermocouple's reference junctions along a span: the latest reading of the channel that measures them (before its first one, that), through
/// its own certificate, as long as it is fresh. A stale one gives none, so that a thermocouple is never evaluated with a junction temperature of some time ago.
/// </summary>
public sealed class JunctionTemperatures
{
    /// <summary>Standard uncertainty of junctions measured by a thermometer without a certificate in force, kelvin (common practice, no source).</summary>
    public const double UncalibratedKelvin = 1;

    private static readonly TimeSpan Least = TimeSpan.FromSeconds(60);

    private readonly TemperatureSeries? _series;
    private readonly double _calibrationKelvin;
    private readonly Estimate _stated;
    private readonly long _freshMicroseconds;
    private int _at;

    private JunctionTemperatures(Estimate stated, TemperatureSeries? series, double calibrationKelvin, TimeSpan fresh)
    {
        (_stated, _series, _calibrationKelvin, _freshMicroseconds) = (stated, series, calibrationKelvin, fresh.Ticks / TimeSpan.TicksPerMicrosecond);
    }

    /// <summary>How old a reading of the junctions may be: five of the intervals that its channel promises, at least a minute.</summary>
    public static TimeSpan FreshFor(Channel junction)
    {
        ArgumentNullException.ThrowIfNull(junction);
        return junction.Interval * 5 > Least ? junction.Interval * 5 : Least;
    }

    /// <summary>The channel that measures the junctions of another; null where none does.</summary>
    public static Channel? ChannelOf(ReferenceSource source, Channel channel)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(channel);
        return channel.ReferenceJunction?.Channel is { } id ? source.FindChannel(id) : null;
    }

    /// <summary>Ids of channels with those of the junctions that they need.</summary>
    public static IReadOnlyList<string> With(ReferenceSource source, IReadOnlyList<string> channels)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(channels);
        string[] junctions =
            [.. channels.Select(source.FindChannel).OfType<Channel>().Select(channel => channel.ReferenceJunction?.Channel).OfType<string>().Distinct().Except(channels, StringComparer.Ordinal)];
        return junctions.Length == 0 ? channels : [.. channels, .. junctions];
    }

    /// <summary>The junctions of a channel over a span; null where its description says nothing of them.</summary>
    /// <param name="snapshot">What is configured.</param>
    /// <param name="channel">The channel of the thermocouple.</param>
    /// <param name="span">The span.</param>
    /// <param name="readings">Readings of the junction's channel among others; those before the span count as long as they are fresh.</param>
    public static JunctionTemperatures? Of(LabSnapshot snapshot, Channel channel, TimeWindow span, ReadingWindow readings)
    {
        ArgumentNullException.ThrowIfNull(snapshot);
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(readings);
        if (channel.ReferenceJunction is not { } junction)
        {
            return null;
        }

        if (junction.Channel is null)
        {
            return new(junction.Celsius, null, 0, TimeSpan.Zero);
        }

        Channel? measured = snapshot.SourceInForce(channel.Key.Source, span.End) is { } source ? ChannelOf(source, channel) : null;
        if (measured is null)
        {
            return new(Estimate.None, TemperatureSeries.Empty, 0, TimeSpan.Zero);
        }

        TimeSpan fresh = FreshFor(measured);
        TimeWindow before = new(span.Start - fresh, span.End);
        CertificateTimeline timeline = CertificateTimeline.Of(snapshot, new ChannelKey(channel.Key.Source, measured.Id), before);
        ReadingSeries? raw = readings.Find(measured.Id)?.Slice(before);
        bool isCalibrated = timeline.References.Count > 0;
        TemperatureSeries series = isCalibrated || !string.Equals(measured.Unit, "Cel", StringComparison.Ordinal)
            ? TemperatureSeries.Of(raw, measured, timeline)
            : TemperatureSeries.Indicated(raw);
        return new(junction.Celsius, series, isCalibrated && double.IsFinite(series.StandardUncertainty) ? series.StandardUncertainty : UncalibratedKelvin, fresh);
    }

    /// <summary>The junctions at a time not before that of the call before; none where their channel has no fresh reading.</summary>
    public Estimate At(long timeMicroseconds)
    {
        if (_series is not { } series)
        {
            return _stated;
        }

        ReadOnlySpan<long> times = series.TimeMicroseconds.Span;
        while (_at < times.Length && times[_at] <= timeMicroseconds)
        {
            _at++;
        }

        int nearest = Math.Max(0, _at - 1);
        return times.Length == 0 || Math.Abs(timeMicroseconds - times[nearest]) > _freshMicroseconds
            ? Estimate.None
            : new(series.Celsius.Span[nearest] + _stated.Value, double.Hypot(_calibrationKelvin, _stated.StandardUncertainty));
    }
}
