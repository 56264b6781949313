using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>
/// A thermometer channel as t90, each reading through the certificate in force at its time. A reading that has no value, or one that the
/// sensor cannot give, is left out and counted; one outside the certificate's range stays and is counted.
/// </summary>
/// <param name="TimeMicroseconds">Device times, rising.</param>
/// <param name="Celsius">t90 in degree Celsius, one a time; all finite.</param>
/// <param name="LeftOut">Readings left out for their quality.</param>
/// <param name="WithoutCertificate">Readings left out because no certificate in force gives their temperature.</param>
/// <param name="OutsideCertificate">Readings that stand although they are outside the range of the certificate.</param>
/// <param name="StandardUncertainty">Largest standard uncertainty that a certificate states for one of them, kelvin; NaN where none does.</param>
public sealed record TemperatureSeries(
    ReadOnlyMemory<long> TimeMicroseconds,
    ReadOnlyMemory<double> Celsius,
    int LeftOut,
    int WithoutCertificate,
    int OutsideCertificate,
    double StandardUncertainty)
{
    private const ReadingQuality Unusable = ReadingQuality.NoValue | ReadingQuality.OutsideSensorRange;

    /// <summary>No readings.</summary>
    public static TemperatureSeries Empty { get; } = new(default, default, 0, 0, 0, double.NaN);

    /// <summary>Readings of a thermocouple left out because its reference junctions had no fresh temperature.</summary>
    public int WithoutJunction { get; init; }

    /// <summary>Number of temperatures.</summary>
    public int Count => Celsius.Length;

    /// <summary>Arithmetic mean of the temperatures, degree Celsius; NaN where there is none.</summary>
    public double MeanCelsius
    {
        get
        {
            double sum = 0;
            foreach (double celsius in Celsius.Span)
            {
                sum += celsius;
            }

            return Count > 0 ? sum / Count : double.NaN;
        }
    }

    /// <summary>Readings in degree Celsius as they are indicated, where no certificate is in force.</summary>
    public static TemperatureSeries Indicated(ReadingSeries? series)
    {
        if (series is null)
        {
            return Empty;
        }

        long[] times = new long[series.Count];
        double[] celsius = new double[series.Count];
        int kept = 0;
        for (int i = 0; i < series.Count; i++)
        {
            double value = series.Values.Span[i];
            if ((series.Qualities.Span[i] & Unusable) == 0 && double.IsFinite(value))
            {
                (times[kept], celsius[kept]) = (series.TimeMicroseconds.Span[i], value);
                kept++;
            }
        }

        return new(times.AsMemory(0, kept), celsius.AsMemory(0, kept), series.Count - kept, 0, 0, double.NaN);
    }

    /// <summary>Evaluates the raw readings of a channel.</summary>
    /// <param name="series">The readings; null for none.</param>
    /// <param name="channel">The channel.</param>
    /// <param name="certificates">Certificates in force over the readings.</param>
    /// <param name="junction">The reference junctions of a thermocouple; null where only the certificate may say what they are kept at.</param>
    public static TemperatureSeries Of(ReadingSeries? series, Channel channel, CertificateTimeline certificates, JunctionTemperatures? junction = null)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(certificates);
        if (series is null)
        {
            return Empty;
        }

        long[] times = new long[series.Count];
        double[] celsius = new double[series.Count];
        int kept = 0, leftOut = 0, without = 0, withoutJunction = 0, outside = 0;
        double uncertainty = double.NaN;
        foreach (CertificateStretch stretch in certificates.Stretches)
        {
            ReadingSeries part = series.Slice(stretch.Span);
            for (int i = 0; i < part.Count; i++)
            {
                if ((part.Qualities.Span[i] & Unusable) != 0)
                {
                    leftOut++;
                    continue;
                }

                Estimate? cold = stretch.Certificate?.Characteristic is ThermocoupleCharacteristic ? junction?.At(part.TimeMicroseconds.Span[i]) : null;
                if (cold is { HasValue: false })
                {
                    withoutJunction++;
                    continue;
                }

                TemperatureEvaluation evaluation = stretch.Certificate is { } certificate
                    ? CertificateEvaluation.Evaluate(certificate, part.Values.Span[i], channel.Unit, new(null, cold))
                    : TemperatureEvaluation.None;
                if (!evaluation.HasValue)
                {
                    without++;
                    continue;
                }

                (times[kept], celsius[kept]) = (part.TimeMicroseconds.Span[i], evaluation.Celsius.Value);
                outside += evaluation.InRange ? 0 : 1;
                uncertainty = evaluation.InRange && !(evaluation.Celsius.StandardUncertainty <= uncertainty)
                    ? evaluation.Celsius.StandardUncertainty
                    : uncertainty;
                kept++;
            }
        }

        return new(times.AsMemory(0, kept), celsius.AsMemory(0, kept), leftOut, without, outside, uncertainty) { WithoutJunction = withoutJunction };
    }

    /// <summary>The temperatures in a window; the counts stay those of the whole.</summary>
    public TemperatureSeries Slice(TimeWindow window)
    {
        int from = FirstNotBefore(window.Start);
        int length = FirstNotBefore(window.End) - from;
        return this with { TimeMicroseconds = TimeMicroseconds.Slice(from, length), Celsius = Celsius.Slice(from, length) };
    }

    /// <summary>Means over minutes since 1970, each at the mean of its times.</summary>
    public TemperatureSeries MinuteMeans()
    {
        const long Minute = 60 * Instant.MicrosecondsPerSecond;
        ReadOnlySpan<long> times = TimeMicroseconds.Span;
        List<long> at = [];
        List<double> means = [];
        for (int i = 0, first = 0; i < times.Length; i++)
        {
            if (i + 1 < times.Length && times[i + 1] / Minute == times[i] / Minute)
            {
                continue;
            }

            double sum = 0;
            long late = 0;
            for (int j = first; j <= i; j++)
            {
                sum += Celsius.Span[j];
                late += times[j] - times[first];
            }

            int count = i - first + 1;
            at.Add(times[first] + (late / count));
            means.Add(sum / count);
            first = i + 1;
        }

        return this with { TimeMicroseconds = at.ToArray(), Celsius = means.ToArray() };
    }

    private int FirstNotBefore(Instant instant)
    {
        int index = TimeMicroseconds.Span.BinarySearch(instant.Microseconds);
        return index < 0 ? ~index : index;
    }
}
