using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;

namespace LabWatch.Assessments.Profiles;

/// <summary>Reads the comparators of a source, with the reasons why one gives no value.</summary>
internal sealed class ComparatorReader(LabSnapshot snapshot, ReferenceSource source, TimeWindow window, ReadingWindow readings, double leastCoverage)
{
    public IReadOnlyList<ComparatorPoint> Read()
    {
        string? closed = Closed();
        return [.. source.Channels
            .Where(channel => (channel.Quantity is ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal) && channel.Band is not null)
            .Select(channel => Point(channel, closed))];
    }

    private ComparatorPoint Point(Channel channel, string? closed)
    {
        WindowMean mean = WindowMean.Of(snapshot, channel, window, readings);
        string? refusal = Refusal(channel, mean, closed);
        bool hasValue = mean.HasValue && mean.Certificate is not null && double.IsFinite(mean.CalibrationKelvin);
        return new(
            channel,
            hasValue ? Combined(mean) : Estimate.None,
            mean.Certificate?.Reference,
            mean.Certificate?.CalibratedAgainst == source.Key,
            refusal);
    }

    private string? Refusal(Channel channel, WindowMean mean, string? closed)
    {
        if (mean.Certificate is not { } certificate)
        {
            return $"no certificate is in force for {channel.Id}";
        }

        if (closed is not null)
        {
            return closed;
        }

        int expected = AxialReader.Expected(window, channel);
        if (mean.CertificateChanged)
        {
            return $"the certificate or the instrument in force for {channel.Id} changed within the window";
        }

        if (mean.LeftOut > 0)
        {
            string range = channel.SensorMinimum is { } minimum && channel.SensorMaximum is { } maximum
                ? FormattableString.Invariant($" ({minimum:0.##} to {maximum:0.##} {channel.Unit})")
                : string.Empty;
            return $"{Quantities.Count(mean.LeftOut)} of {Quantities.Count(mean.LeftOut + mean.Count)} readings of {channel.Id} have no value or one that it cannot give{range}: "
                + "its sign for under-range or saturation";
        }

        if (mean.Count == 0 || mean.Count < leastCoverage * expected)
        {
            return $"{channel.Id} gave {Quantities.Count(mean.Count)} of {Quantities.Count(expected)} readings";
        }

        return mean.OutsideCertificate > 0
            ? $"{Quantities.Count(mean.OutsideCertificate)} of {Quantities.Count(mean.Count)} readings of {channel.Id} lie outside the range of its certificate "
                + $"({Quantities.Fixed(certificate.MinimumCelsius, 0)} to {Quantities.Fixed(certificate.MaximumCelsius, 0)} degC)"
            : null;
    }

    /// <summary>The reason that a shutter is one; null where none is closed or none is reported.</summary>
    private string? Closed()
    {
        foreach (Channel shutter in source.Channels.Where(channel => channel.Quantity is ChannelQuantity.Shutter))
        {
            if (readings.Find(shutter.Id)?.Slice(window) is not { Count: > 0 } series)
            {
                return $"it is not known whether the shutter is open: {shutter.Id} has no reading";
            }

            int closed = 0;
            for (int i = 0; i < series.Count; i++)
            {
                closed += (series.Qualities.Span[i] & ReadingQuality.NoValue) == 0 && series.Values.Span[i] >= 0.5 ? 0 : 1;
            }

            if (closed > 0)
            {
                return $"the shutter was closed in {Quantities.Count(closed)} of {Quantities.Count(series.Count)} readings";
            }
        }

        return null;
    }

    private static Estimate Combined(WindowMean mean)
    {
        double u = double.Hypot(mean.CalibrationKelvin, mean.NoiseKelvin);
        double share = Math.Pow(mean.NoiseKelvin / u, 4);
        return new(mean.Celsius, u, share > 0 ? (BatchMeans.Parts - 1) / share : double.PositiveInfinity);
    }
}
