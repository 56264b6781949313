using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Evaluation;

/// <summary>The temperature of a thermocouple's reference junctions from newest readings, by the rules of <see cref="JunctionTemperatures"/>.</summary>
public static class NewestJunction
{
    private const ReadingQuality Unusable = ReadingQuality.NoValue | ReadingQuality.OutsideSensorRange;

    /// <summary>
    /// The junctions of a channel for a reading at an instant: null where its description says nothing of them, <see cref="Estimate.None"/> where their channel has
    /// no fresh reading (of up to <see cref="JunctionTemperatures.FreshFor"/> before or after).
    /// </summary>
    /// <param name="snapshot">What is configured.</param>
    /// <param name="source">The source.</param>
    /// <param name="channel">The channel of the thermocouple.</param>
    /// <param name="at">Time of its reading.</param>
    /// <param name="newest">Finds the newest reading of a channel by its id.</param>
    public static Estimate? Of(LabSnapshot snapshot, ReferenceSource source, Channel channel, Instant at, Func<string, Reading?> newest)
    {
        ArgumentNullException.ThrowIfNull(snapshot);
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(newest);
        if (channel.ReferenceJunction is not { } junction)
        {
            return null;
        }

        if (junction.Channel is null)
        {
            return junction.Celsius;
        }

        Channel? measured = JunctionTemperatures.ChannelOf(source, channel);
        if (measured is null || newest(measured.Id) is not { } reading || (reading.Quality & Unusable) != 0 || (at - reading.Time).Duration() > JunctionTemperatures.FreshFor(measured))
        {
            return Estimate.None;
        }

        Estimate thermometer = Thermometer(snapshot.CertificateInForce(measured.Key, reading.Time), measured, reading);
        return thermometer.HasValue
            ? new(thermometer.Value + junction.Celsius.Value, double.Hypot(thermometer.StandardUncertainty, junction.Celsius.StandardUncertainty))
            : Estimate.None;
    }

    private static Estimate Thermometer(Certificate? certificate, Channel channel, in Reading reading)
    {
        if (certificate is null)
        {
            return string.Equals(channel.Unit, "Cel", StringComparison.Ordinal) && double.IsFinite(reading.Value)
                ? new(reading.Value, JunctionTemperatures.UncalibratedKelvin)
                : Estimate.None;
        }

        TemperatureEvaluation evaluation = CertificateEvaluation.Evaluate(certificate, reading.Value, channel.Unit);
        double u = evaluation.Celsius.StandardUncertainty;
        return evaluation.HasValue ? new(evaluation.Celsius.Value, double.IsFinite(u) ? u : JunctionTemperatures.UncalibratedKelvin) : Estimate.None;
    }
}
