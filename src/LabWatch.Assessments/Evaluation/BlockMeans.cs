using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Readings;

namespace LabWatch.Assessments.Evaluation;

/// <summary>
/// A channel as means over equal blocks of a span. Thermometers as t90 through the certificate in force (indicated where none is and they read in degree Celsius);
/// everything else in its own unit. Where one certificate is in force throughout, the mean of a block is converted, and not each of its readings: its curvature over what a block spans at a set point is below 1 uK.
/// </summary>
/// <param name="Means">One a block; NaN for a block with fewer than half of the promised readings.</param>
/// <param name="Calibration">Standard uncertainty that the certificate states; NaN where none is in force or a reading lies outside its range.</param>
/// <param name="OutsideCertificate">Means, or readings, outside the range of the certificate.</param>
/// <param name="Certificates">Certificates used, as <c>id@revision</c>.</param>
internal sealed record BlockMeans(double[] Means, double Calibration, int OutsideCertificate, IReadOnlyList<string> Certificates)
{
    private const double LeastPart = 0.5;

    /// <summary>Whether any block has a mean.</summary>
    public bool HasValue => Means.Any(double.IsFinite);

    public static BlockMeans Of(LabSnapshot snapshot, Channel channel, TimeWindow span, TimeSpan block, ReadingWindow readings)
    {
        CertificateTimeline timeline = CertificateTimeline.Of(snapshot, channel.Key, span);
        ReadingSeries? series = readings.Find(channel.Id)?.Slice(span);
        int least = Math.Max(1, (int)(LeastPart * (block / channel.Interval)));
        if (timeline.Stretches is [{ Certificate: { Characteristic: not ThermocoupleCharacteristic } certificate }])
        {
            return Converted(certificate, channel, Average(TemperatureSeries.Indicated(series), span, block, least), timeline);
        }

        bool isRaw = channel.Unit is "Ohm" or "mV";
        TemperatureSeries values = timeline.References.Count > 0 || isRaw
            ? TemperatureSeries.Of(series, channel, timeline, JunctionTemperatures.Of(snapshot, channel, span, readings))
            : TemperatureSeries.Indicated(series);
        return new(Average(values, span, block, least), values.StandardUncertainty, values.OutsideCertificate, timeline.References);
    }

    private static BlockMeans Converted(Certificate certificate, Channel channel, double[] raw, CertificateTimeline timeline)
    {
        double calibration = double.NaN;
        int outside = 0;
        for (int i = 0; i < raw.Length; i++)
        {
            TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(certificate, raw[i], channel.Unit);
            outside += evaluation.HasValue && !evaluation.InRange ? 1 : 0;
            calibration = evaluation.InRange && !(evaluation.Celsius.StandardUncertainty <= calibration) ? evaluation.Celsius.StandardUncertainty : calibration;
            raw[i] = evaluation.HasValue ? evaluation.Celsius.Value : double.NaN;
        }

        return new(raw, calibration, outside, timeline.References);
    }

    private static double[] Average(TemperatureSeries values, TimeWindow span, TimeSpan block, int least)
    {
        long length = block.Ticks / TimeSpan.TicksPerMicrosecond;
        double[] means = new double[(int)(span.Duration.Ticks / block.Ticks)];
        ReadOnlySpan<long> times = values.TimeMicroseconds.Span;
        ReadOnlySpan<double> all = values.Celsius.Span;
        int next = 0;
        for (int i = 0; i < means.Length; i++)
        {
            long end = span.Start.Microseconds + ((i + 1) * length);
            double sum = 0;
            int count = 0;
            for (; next < times.Length && times[next] < end; next++, count++)
            {
                sum += all[next];
            }

            means[i] = count >= least ? sum / count : double.NaN;
        }

        return means;
    }
}
