using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Sources;

/// <summary>Reads a store and makes the columns of an answer.</summary>
internal static class ReadingViews
{
    /// <summary>The readings of a checked request.</summary>
    public static async ValueTask<ReadingsView> MakeAsync(
        LabSnapshot lab, ReferenceSource source, ReadingRequest request, IReadingStore store, CancellationToken cancellationToken)
    {
        ReadingsView empty = Empty(source, request);
        if (request.Bucket is { } bucket)
        {
            IReadOnlyList<ReadingSummary> rows = await store.ReduceAsync(request.Channel.Key, request.Window, bucket, cancellationToken).ConfigureAwait(false);
            BucketJunctions? junctions = await BucketJunctions.ReadAsync(lab, source, request.Channel, request.Window, bucket, store, cancellationToken).ConfigureAwait(false);
            return Reduced(lab, request.Channel, empty, rows, junctions);
        }

        IReadOnlyList<string> channels = JunctionTemperatures.With(source, [request.Channel.Id]);
        ReadingWindow window = await store.ReadAsync(source.Key, channels, request.Window, cancellationToken).ConfigureAwait(false);
        return window.Find(request.Channel.Id) is { } series
            ? Raw(lab, request.Channel, empty, series, JunctionTemperatures.Of(lab, request.Channel, request.Window, window))
            : empty with { Quality = [] };
    }

    private static ReadingsView Empty(ReferenceSource source, ReadingRequest request) => new(
        source.Key.ToString(),
        request.Channel.Id,
        request.Channel.Unit,
        request.Window.Start,
        request.Window.End,
        request.Bucket?.TotalSeconds,
        Time: [],
        Raw: [],
        RawMinimum: null,
        RawMaximum: null,
        Count: null,
        Celsius: Temperatures.IsTemperature(request.Channel) ? [] : null,
        CelsiusMinimum: null,
        CelsiusMaximum: null,
        Quality: null);

    private static ReadingsView Raw(LabSnapshot lab, Channel channel, ReadingsView view, ReadingSeries series, JunctionTemperatures? junctions)
    {
        CertificateLookup certificates = new(lab, channel);
        Instant[] times = new Instant[series.Count];
        double?[] raw = new double?[series.Count];
        int[] quality = new int[series.Count];
        double?[]? celsius = view.Celsius is null ? null : new double?[series.Count];
        for (int i = 0; i < times.Length; i++)
        {
            times[i] = new Instant(series.TimeMicroseconds.Span[i]);
            raw[i] = Numbers.OrNull(series.Values.Span[i]);
            quality[i] = (int)series.Qualities.Span[i];
            if (celsius is not null)
            {
                celsius[i] = Celsius(channel, certificates.At(times[i]), times[i], series.Values.Span[i], junctions?.At(times[i].Microseconds));
            }
        }

        return view with { Time = times, Raw = raw, Quality = quality, Celsius = celsius };
    }

    private static ReadingsView Reduced(LabSnapshot lab, Channel channel, ReadingsView view, IReadOnlyList<ReadingSummary> rows, BucketJunctions? junctions)
    {
        bool isTemperature = view.Celsius is not null;
        CertificateLookup certificates = new(lab, channel);
        (double? Low, double? Mean, double? High)[] celsius = isTemperature ? [.. rows.Select(row => Celsius(channel, certificates.At(row.Start), row, junctions?.At(row.Start)))] : [];
        return view with
        {
            Time = [.. rows.Select(row => row.Start)],
            Raw = [.. rows.Select(row => Numbers.OrNull(row.Mean))],
            RawMinimum = [.. rows.Select(row => row.Minimum)],
            RawMaximum = [.. rows.Select(row => row.Maximum)],
            Count = [.. rows.Select(row => row.Count)],
            Celsius = isTemperature ? [.. celsius.Select(row => row.Mean)] : null,
            CelsiusMinimum = isTemperature ? [.. celsius.Select(row => row.Low)] : null,
            CelsiusMaximum = isTemperature ? [.. celsius.Select(row => row.High)] : null,
        };
    }

    /// <summary>A bucket's temperatures: the characteristic of a thermometer is monotonic, so its extremes come from the raw extremes (swapped where it falls).</summary>
    private static (double? Low, double? Mean, double? High) Celsius(Channel channel, Certificate? certificate, ReadingSummary row, Estimate? junction)
    {
        double? one = Celsius(channel, certificate, row.Start, row.Minimum, junction);
        double? other = Celsius(channel, certificate, row.Start, row.Maximum, junction);
        double? mean = Celsius(channel, certificate, row.Start, row.Mean, junction);
        return one <= other ? (one, mean, other) : (other, mean, one);
    }

    private static double? Celsius(Channel channel, Certificate? certificate, Instant time, double raw, Estimate? junction) =>
        Temperatures.Of(channel, certificate, time, raw, junction)?.Celsius;
}
