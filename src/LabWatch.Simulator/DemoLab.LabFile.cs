using System.Globalization;
using System.Text.RegularExpressions;
using LabWatch.Lab.Time;

namespace LabWatch.Simulator;

public static partial class DemoLab
{
    private static readonly Instant WrittenFor = Instant.From(new DateTimeOffset(2026, 11, 1, 0, 0, 0, TimeSpan.Zero));

    /// <summary>The lab file as it is written, with dates as if the demo had begun on 1 November 2026.</summary>
    public static string LabFileText { get; } = ReadResource();

    /// <summary>
    /// The lab file for a demo that began at an instant: all dates moved by the same number of whole days, so that certificates are as old as they were
    /// written to be. The same day gives the same text.
    /// </summary>
    public static string LabFileFor(Instant firstStart)
    {
        TimeSpan shift = TimeSpan.FromDays(Math.Floor((firstStart - WrittenFor).TotalDays));
        return Timestamp().Replace(LabFileText, match =>
        {
            DateTimeOffset written = DateTimeOffset.ParseExact(match.ValueSpan[1..^1], "yyyy-MM-dd'T'HH:mm:ssK", CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal);
            return $"\"{Instant.From(written) + shift}\"";
        });
    }

    private static string ReadResource()
    {
        using Stream stream = typeof(DemoLab).Assembly.GetManifestResourceStream("LabWatch.Simulator.hollin-vale.lab.json")!;
        using StreamReader reader = new(stream);
        return reader.ReadToEnd();
    }

    [GeneratedRegex("\"[0-9]{4}-[0-9]{2}-[0-9]{2}T[0-9]{2}:[0-9]{2}:[0-9]{2}Z\"", RegexOptions.CultureInvariant)]
    private static partial Regex Timestamp();
}
