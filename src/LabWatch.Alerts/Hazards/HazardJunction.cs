using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// The reference junctions of a watched thermocouple: kept at a temperature, or measured by a channel whose newest reading counts while it is fresh by the
/// monotonic clock. Guarded by the lock of its source.
/// </summary>
internal sealed class HazardJunction(ReferenceJunction junction, Channel? measured, TimeProvider clock)
{
    private const ReadingQuality Invalid = ReadingQuality.NoValue | ReadingQuality.OutsideSensorRange;
    private static readonly TimeSpan Least = TimeSpan.FromSeconds(60);

    private double _measured = double.NaN;
    private long _heard;

    /// <summary>The channel that measures it; null where it is kept.</summary>
    public Channel? Measured { get; } = measured;

    /// <summary>The certificate in force of that channel; null to take its readings as indicated.</summary>
    public Certificate? Certificate { get; set; }

    /// <summary>Temperature, degree Celsius; NaN where it was not heard lately.</summary>
    public double Celsius => Measured is null
        ? junction.Channel is null ? junction.Celsius.Value : double.NaN
        : clock.GetElapsedTime(_heard) <= (Measured.Interval * 5 > Least ? Measured.Interval * 5 : Least) ? _measured + junction.Celsius.Value : double.NaN;

    /// <summary>Takes a reading of the channel that measures it.</summary>
    public void Hear(in Reading reading)
    {
        if ((reading.Quality & Invalid) != 0)
        {
            return;
        }

        double celsius = Certificate is { } certificate
            ? CertificateEvaluation.Evaluate(certificate, reading.Value, Measured!.Unit).Celsius.Value
            : string.Equals(Measured!.Unit, "Cel", StringComparison.Ordinal) ? reading.Value : double.NaN;
        if (double.IsFinite(celsius))
        {
            (_measured, _heard) = (celsius, clock.GetTimestamp());
        }
    }
}
