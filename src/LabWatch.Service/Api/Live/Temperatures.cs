using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Temperatures of channels for people to look at: through the certificate in force where there is one.</summary>
internal static class Temperatures
{
    /// <summary>Whether a channel's values are temperatures once the certificate has been applied.</summary>
    public static bool IsTemperature(Channel channel) =>
        channel.Quantity == ChannelQuantity.WellThermometer || string.Equals(channel.Unit, "Cel", StringComparison.Ordinal);

    /// <summary>The temperature of a newest reading; null where the channel gives none or has no certificate to make one with.</summary>
    /// <param name="lab">What is configured.</param>
    /// <param name="source">The source.</param>
    /// <param name="channel">The channel.</param>
    /// <param name="newest">Newest readings by channel, that of the channel among them.</param>
    public static TemperatureView? Of(LabSnapshot lab, ReferenceSource source, Channel channel, IReadOnlyDictionary<string, Reading> newest)
    {
        Reading reading = newest[channel.Id];
        Estimate? junction = NewestJunction.Of(lab, source, channel, reading.Time, id => newest.TryGetValue(id, out Reading found) ? found : null);
        return Of(channel, lab.CertificateInForce(channel.Key, reading.Time), reading.Time, reading.Value, junction);
    }

    /// <summary>The temperature of a raw value through a certificate already looked up, and the reference junctions of a thermocouple.</summary>
    public static TemperatureView? Of(Channel channel, Certificate? certificate, Instant time, double raw, Estimate? junction)
    {
        if (certificate is null)
        {
            return double.IsFinite(raw) && string.Equals(channel.Unit, "Cel", StringComparison.Ordinal)
                ? new TemperatureView(raw, null, null, null, false, time)
                : null;
        }

        TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(certificate, raw, channel.Unit, new(null, junction));
        double factor = certificate.Characteristic.CoverageFactor;
        return evaluation.HasValue
            ? new TemperatureView(
                evaluation.Celsius.Value,
                Numbers.OrNull(evaluation.Celsius.StandardUncertainty * factor),
                factor,
                RecordNames.Of(certificate),
                evaluation.InRange,
                time)
            : null;
    }
}
