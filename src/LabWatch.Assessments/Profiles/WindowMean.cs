using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
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
    /// <summary>Readings of a thermocouple without a fresh temperature of its reference junctions.</summary>
    public int WithoutJunction { get; init; }

    public bool HasValue => double.IsFinite(Celsius);

    /// <summary>Standard uncertainty of the mean, kelvin, with that of the certificate or another where it has none.</summary>
    public double StandardUncertainty(double withoutCertificate) => double.Hypot(NoiseKelvin, double.IsFinite(CalibrationKelvin) ? CalibrationKelvin : withoutCertificate);

    public static WindowMean Of(LabSnapshot snapshot, Channel channel, TimeWindow window, ReadingWindow readings)
    {
        CertificateTimeline timeline = CertificateTimeline.Of(snapshot, channel.Key, window);
        ReadingSeries? series = readings.Find(channel.Id)?.Slice(window);
        bool hasCertificate = timeline.Stretches.Any(stretch => stretch.Certificate is not null);
        TemperatureSeries temperatures = hasCertificate || !string.Equals(channel.Unit, "Cel", StringComparison.Ordinal)
            ? TemperatureSeries.Of(series, channel, timeline, JunctionTemperatures.Of(snapshot, channel, window, readings))
            : TemperatureSeries.Indicated(series);
        double noise = BatchMeans.StandardError(temperatures.TimeMicroseconds.Span, temperatures.Celsius.Span, window);
        return new(
            temperatures.MeanCelsius,
            double.IsFinite(noise) ? noise : 0,
            temperatures.StandardUncertainty,
            temperatures.Count,
            temperatures.LeftOut,
            temperatures.OutsideCertificate,
            timeline.Stretches[^1].Certificate,
            timeline.Stretches.Count > 1)
        {
            WithoutJunction = temperatures.WithoutJunction,
        };
    }
}
