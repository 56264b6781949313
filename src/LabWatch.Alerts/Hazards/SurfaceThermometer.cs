using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Alerts.Hazards;

/// <summary>How the raw readings of one surface channel become a temperature at present.</summary>
/// <param name="Certificate">Certificate in force whose unit fits; null where the reading is taken as indicated.</param>
/// <param name="Usable">Whether a temperature can be had at all: a raw resistance or voltage means none without a certificate.</param>
internal readonly record struct SurfaceThermometer(Certificate? Certificate, bool Usable)
{
    /// <summary>What measures the reference junctions of a thermocouple; null where nothing does.</summary>
    public HazardJunction? Junction { get; init; }

    /// <summary>The thermometer of a channel with the certificate in force.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="certificate">The certificate in force; null for none.</param>
    /// <param name="junction">What measures its reference junctions; null where nothing does.</param>
    public static SurfaceThermometer For(Channel channel, Certificate? certificate, HazardJunction? junction = null)
    {
        Certificate? fitting = certificate is not null && string.Equals(certificate.Characteristic.RawUnit, channel.Unit, StringComparison.Ordinal)
            ? certificate
            : null;
        return new SurfaceThermometer(fitting, fitting is not null || string.Equals(channel.Unit, "Cel", StringComparison.Ordinal)) { Junction = junction };
    }

    /// <summary>
    /// The temperature for a raw value, degree Celsius; NaN where there is none. Outside the certificate's range the value counts all the
    /// same: for a hazard a doubtful value is better than none. A thermocouple whose reference junctions were not heard lately has none: it counts as silent.
    /// </summary>
    public double Celsius(double raw) => !Usable ? double.NaN : Certificate is null ? raw : Evaluate(raw).Celsius.Value;

    /// <summary>Whether a raw value lies inside the range of the certificate; true without one.</summary>
    public bool IsInRange(double raw) => Certificate is null || Evaluate(raw).InRange;

    private TemperatureEvaluation Evaluate(double raw) =>
        CertificateEvaluation.Evaluate(Certificate!, raw, Junction is { } junction ? new(null, new Estimate(junction.Celsius, 0)) : default);
}
