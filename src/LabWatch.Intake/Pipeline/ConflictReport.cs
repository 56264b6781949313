using System.Globalization;
using System.Text;
using LabWatch.Intake.Payloads;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Intake.Pipeline;

/// <summary>Turns readings that the store refused into messages for quarantine, written as the SenML pack that would send them again.</summary>
internal static class ConflictReport
{
    public static QuarantinedMessage Of(ReadingConflict conflict, string root) => new(
        conflict.Arrival,
        $"{root}/{conflict.Source.Site}/{conflict.Source.Source}/{conflict.Refused.Channel}",
        Encode([conflict.Refused]),
        [
            new Finding(
                IntakeCode.ConflictingValue,
                "/0/v",
                string.Create(CultureInfo.InvariantCulture, $"The value {conflict.StoredValue:R} stands for {conflict.Refused.Channel} at {conflict.Refused.Time} and stays."),
                conflict.Refused.Value.ToString("R", CultureInfo.InvariantCulture),
                "Find out why the device sent two values for one time."),
        ]);

    public static QuarantinedMessage Of(ReadingPack pack, Exception reason, string root) => new(
        pack.Arrival,
        $"{root}/{pack.Source.Site}/{pack.Source.Source}",
        Encode(pack.Readings),
        [new Finding(IntakeCode.StoreRefused, string.Empty, "The store refused this pack while it took others.", Finding.Quote(reason.Message), "Report it with this message.")]);

    private static byte[] Encode(IReadOnlyList<Reading> readings)
    {
        var json = new StringBuilder("[");
        foreach (Reading reading in readings)
        {
            string value = double.IsNaN(reading.Value) ? "null" : reading.Value.ToString("R", CultureInfo.InvariantCulture);
            json.Append(json.Length > 1 ? "," : string.Empty)
                .Append(CultureInfo.InvariantCulture, $"{{\"n\":\"{reading.Channel}\",\"t\":{Seconds(reading.Time)},\"v\":{value}}}");
        }

        return Encoding.UTF8.GetBytes(json.Append(']').ToString());
    }

    private static string Seconds(Instant time) => ((decimal)time.Microseconds / Instant.MicrosecondsPerSecond).ToString(CultureInfo.InvariantCulture);
}
