using System.Globalization;
using System.Text;

namespace LabWatch.Benchmarks.Intake;

/// <summary>Writes the payloads: values with noise in the last of seven digits, times one millisecond apart.</summary>
internal static class PackWriter
{
    /// <summary>Topic and payload of one message: a pack on the source's topic, or a single record on a channel's.</summary>
    public static (string Topic, byte[] Payload) Write(int source, int number, int records, long startMicroseconds)
    {
        decimal time = (startMicroseconds + (number * 1_000L)) / 1_000_000m;
        var random = new Random(number);
        string topic = $"lab/{BenchLab.Site}/source-{source}";
        if (records == 1)
        {
            int channel = number % BenchLab.Channels;
            return ($"{topic}/channel-{channel}", Encoding.UTF8.GetBytes(string.Create(CultureInfo.InvariantCulture, $$"""[{"u":"W","t":{{time}},"v":{{Value(random)}}}]""")));
        }

        var json = new StringBuilder("[");
        for (int i = 0; i < records; i++)
        {
            json.Append(i == 0 ? string.Create(CultureInfo.InvariantCulture, $$"""{"bt":{{time}},"bu":"W","n":"channel-0",""") : string.Create(CultureInfo.InvariantCulture, $$""",{"n":"channel-{{i}}","""))
                .Append(CultureInfo.InvariantCulture, $"\"v\":{Value(random)}}}");
        }

        return (topic, Encoding.UTF8.GetBytes(json.Append(']').ToString()));
    }

    private static string Value(Random random) => (107.7 + (random.Next(10_000) * 1e-4)).ToString("F4", CultureInfo.InvariantCulture);
}
