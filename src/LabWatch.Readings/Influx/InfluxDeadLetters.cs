using System.Globalization;
using System.Text;
using LabWatch.Lab.Findings;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Readings.Influx;

/// <summary>Keeps readings that the server will never take in the quarantine, with its reason, before anybody is told that they are done with.</summary>
internal sealed class InfluxDeadLetters(IQuarantine quarantine)
{
    public async Task KeepAsync(IEnumerable<(InfluxPoint Point, string Reason)> refused, CancellationToken cancellationToken) =>
        await quarantine.AddAsync([.. refused.Select(one => Message(one.Point, one.Reason))], cancellationToken);

    private static QuarantinedMessage Message(InfluxPoint point, string reason)
    {
        string text = string.Create(
            CultureInfo.InvariantCulture,
            $$"""{"source":"{{point.Pack!.Source}}","channel":"{{point.Reading.Channel}}","timeMicroseconds":{{point.Reading.Time.Microseconds}},"bits":{{BitConverter.DoubleToInt64Bits(point.Reading.Value)}},"quality":{{(int)point.Reading.Quality}}}""");
        return new QuarantinedMessage(point.Pack.Arrival, $"readings/{point.Pack.Source}/{point.Reading.Channel}", Encoding.UTF8.GetBytes(text), [
            new Finding(
                "refused-by-store", point.Reading.Channel, $"The database refuses this reading: {Finding.Quote(reason)}",
                string.Create(CultureInfo.InvariantCulture, $"{point.Reading.Value:R}"),
                "Correct the database (type of a field, retention), then send the reading again."),
        ]);
    }
}
