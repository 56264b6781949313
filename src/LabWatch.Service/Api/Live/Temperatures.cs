using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Temperatures of channels for people to look at: through the certificate in force where there is one.</summary>
internal static class Temperatures
{
    /// <summary>Whether a channel's values are temperatures once the certificate has been applied.</summary>
    public static bool IsTemperature(Channel channel) =>
        channel.Quantity == ChannelQuantity.WellThermometer || string.Equals(channel.Unit, "Cel", StringComparison.Ordinal);

    /// <summary>The temperature of a raw value; null where the channel gives none or has no certificate to make one with.</summary>
    public static TemperatureView? Of(LabSnapshot lab, Channel channel, Instant time, double raw) =>
        Of(channel, lab.CertificateInForce(channel.Key, time), time, raw);

    /// <summary>The temperature of a raw value through a certificate already looked up.</summary>
    public static TemperatureView? Of(Channel channel, Certificate? certificate, Instant time, double raw)
    {
        if (certificate is null)
        {
            return double.IsFinite(raw) && string.Equals(channel.Unit, "Cel", StringComparison.Ordinal)
                ? new TemperatureView(raw, null, null, null, false, time)
                : null;
        }

        TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(certificate, raw, channel.Unit);
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
