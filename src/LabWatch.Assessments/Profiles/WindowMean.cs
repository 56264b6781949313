using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Profiles;

/// <summary>The mean of a temperature channel over a window.</summary>
/// <param name="Celsius">Mean t90 (or indication, where no certificate is in force and the channel reads in degree Celsius); NaN where there is none.</param>
/// <param name="NoiseKelvin">Standard error of the mean from the scatter within the window; zero where too few readings show it.</param>
/// <param name="CalibrationKelvin">Standard uncertainty that the certificate states; NaN where there is none or a reading is outside of its range.</param>
/// <param name="Count">Readings with a usable value.</param>
/// <param name="LeftOut">Readings without a value, or that the sensor cannot give.</param>
/// <param name="OutsideCertificate">Readings outside the range of the certificate.</param>
/// <param name="Certificate">The certificate in force at the end of the window; null where there is none.</param>
/// <param name="CertificateChanged">Whether another was in force at the start.</param>
internal readonly record struct WindowMean(
    double Celsius, double NoiseKelvin, double CalibrationKelvin, int Count, int LeftOut, int OutsideCertificate, Certificate? Certificate, bool CertificateChanged)
{
    private const ReadingQuality Unusable = ReadingQuality.NoValue | ReadingQuality.OutsideSensorRange;

    public bool HasValue => double.IsFinite(Celsius);

    /// <summary>Standard uncertainty of the mean, kelvin, with that of the certificate or another where it has none.</summary>
    public double StandardUncertainty(double withoutCertificate) => double.Hypot(NoiseKelvin, double.IsFinite(CalibrationKelvin) ? CalibrationKelvin : withoutCertificate);

    public static WindowMean Of(LabSnapshot snapshot, Channel channel, TimeWindow window, ReadingWindow readings)
    {
        CertificateTimeline timeline = CertificateTimeline.Of(snapshot, channel.Key, window);
        ReadingSeries? series = readings.Find(channel.Id)?.Slice(window);
        bool hasCertificate = timeline.Stretches.Any(stretch => stretch.Certificate is not null);
        TemperatureSeries temperatures = hasCertificate || !string.Equals(channel.Unit, "Cel", StringComparison.Ordinal)
            ? TemperatureSeries.Of(series, channel, timeline)
            : Indicated(series);
        double noise = BatchMeans.StandardError(temperatures.TimeMicroseconds.Span, temperatures.Celsius.Span, window);
        return new(
            temperatures.MeanCelsius,
            double.IsFinite(noise) ? noise : 0,
            temperatures.StandardUncertainty,
            temperatures.Count,
            temperatures.LeftOut,
            temperatures.OutsideCertificate,
            timeline.Stretches[^1].Certificate,
            timeline.Stretches.Count > 1);
    }

    private static TemperatureSeries Indicated(ReadingSeries? series)
    {
        if (series is null)
        {
            return TemperatureSeries.Empty;
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
}
