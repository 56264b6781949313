using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Readiness;

/// <summary>What a source's newest readings say.</summary>
/// <param name="Reference">The channel that the source's temperature is taken from; null where it has none.</param>
/// <param name="LastReading">Newest reading of that channel; null where there is none.</param>
/// <param name="Celsius">Its temperature, degree Celsius; NaN where unknown.</param>
/// <param name="SetPointCelsius">Set point, degree Celsius; NaN where unknown.</param>
/// <param name="SetPointIsInRange">Whether the set point is one that the source is used at, within how near it has to stand to it.</param>
/// <param name="HeaterIsOff">Whether a heater channel says that nothing is put in; null where none tells.</param>
internal sealed record SourceNow(
    Channel? Reference, Instant? LastReading, double Celsius, double SetPointCelsius, bool SetPointIsInRange, bool? HeaterIsOff)
{
    /// <summary>Heater power below this counts as none, watt. Idle controllers draw a little.</summary>
    private const double NoPowerWatt = 1;

    /// <summary>Heater duty or current below this counts as none.</summary>
    private const double NoDrive = 0.002;

    /// <summary>
    /// Off: nothing is put in although the source stands below its set point, or there is no set point that the source is used at (some controllers report 0 when
    /// they are off). A heater that rests while the source cools down, or is held by a chiller, is not off.
    /// </summary>
    public bool IsOff => HeaterIsOff is true
        && (!SetPointIsInRange || SetPointCelsius - Celsius > StabilityObstacles.AtTemperatureKelvin(SetPointCelsius));

    public static SourceNow Of(ReadinessInput input)
    {
        Channel? reference = ReferenceOf(input.Source);
        Reading? last = reference is null ? null : Find(input, reference);
        double setPoint = Value(input, ChannelQuantity.SetPoint);
        double tolerance = StabilityObstacles.AtTemperatureKelvin(setPoint);
        bool inRange = setPoint >= input.Source.MinimumCelsius - tolerance && setPoint <= input.Source.MaximumCelsius + tolerance;
        return new(reference, last?.Time, Temperature(input, reference, last), setPoint, inRange, HeaterOff(input));
    }

    /// <summary>The channel that a source's temperature is taken from: the reference well, else its first comparator; null where it has neither.</summary>
    public static Channel? ReferenceOf(ReferenceSource source) =>
        source.ReferenceChannel ?? source.Channels.FirstOrDefault(channel => channel.Quantity is ChannelQuantity.ComparatorTemperature);

    /// <summary>The newest reading of a channel; null where there is none.</summary>
    public static Reading? Find(ReadinessInput input, Channel channel) => Find(input, channel.Id);

    private static Reading? Find(ReadinessInput input, string channel)
    {
        foreach (Reading reading in input.Newest)
        {
            if (string.Equals(reading.Channel, channel, StringComparison.Ordinal))
            {
                return reading;
            }
        }

        return null;
    }

    private static double Temperature(ReadinessInput input, Channel? channel, Reading? reading) =>
        channel is null || reading is not { } last ? double.NaN
        : input.Snapshot.CertificateInForce(channel.Key, last.Time) is { } certificate
            ? CertificateEvaluation.Evaluate(certificate, last.Value, channel.Unit, new(null, NewestJunction.Of(input.Snapshot, input.Source, channel, last.Time, id => Find(input, id)))).Celsius.Value
        : string.Equals(channel.Unit, "Cel", StringComparison.Ordinal) ? last.Value
        : double.NaN;

    private static bool? HeaterOff(ReadinessInput input)
    {
        double power = Value(input, ChannelQuantity.HeaterPower);
        double drive = Value(input, ChannelQuantity.HeaterDuty) is var duty && double.IsNaN(duty) ? Value(input, ChannelQuantity.HeaterCurrent) : duty;
        return !double.IsNaN(power) ? power < NoPowerWatt
            : !double.IsNaN(drive) ? drive < NoDrive
            : null;
    }

    private static double Value(ReadinessInput input, ChannelQuantity quantity) =>
        input.Source.Channels.FirstOrDefault(channel => channel.Quantity == quantity) is { } channel && Find(input, channel) is { } reading
            ? reading.Value
            : double.NaN;
}
