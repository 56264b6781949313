using System.Diagnostics.Metrics;

namespace LabWatch.Readings;

/// <summary>Figures of the store of readings for whoever listens, under the meter <see cref="MeterName"/>.</summary>
public static class ReadingsMetrics
{
    /// <summary>Name of the meter.</summary>
    public const string MeterName = "LabWatch.Readings";

    private static readonly Meter ReadingsMeter = new(MeterName);
    private static readonly Counter<long> Accepted = ReadingsMeter.CreateCounter<long>("labwatch.readings.accepted", "{reading}", "Readings made durable.");
    private static readonly Counter<long> Duplicates = ReadingsMeter.CreateCounter<long>("labwatch.readings.duplicates", "{reading}", "Readings that were there already with the same value.");
    private static readonly Counter<long> Conflicts = ReadingsMeter.CreateCounter<long>("labwatch.readings.conflicts", "{reading}", "Readings refused because another value stands for their identity.");
    private static readonly Histogram<double> Commit = ReadingsMeter.CreateHistogram<double>("labwatch.readings.commit.duration", "s", "Time of a durable commit.");
    private static readonly Counter<long> Sealed = ReadingsMeter.CreateCounter<long>("labwatch.readings.sealed_parts", "{part}", "Parts of source-hours sealed.");
    private static readonly UpDownCounter<long> Unsealed = ReadingsMeter.CreateUpDownCounter<long>("labwatch.readings.unsealed", "{reading}", "Readings in memory that are not sealed yet.");
    private static readonly UpDownCounter<long> Journal = ReadingsMeter.CreateUpDownCounter<long>("labwatch.readings.journal.size", "By", "Bytes of the journal rows.");

    internal static void OnJournal(long change) => Journal.Add(change);

    internal static void OnAppended(int accepted, int duplicates, int conflicts, TimeSpan duration)
    {
        Accepted.Add(accepted);
        Duplicates.Add(duplicates);
        Conflicts.Add(conflicts);
        Commit.Record(duration.TotalSeconds);
        Unsealed.Add(accepted);
    }

    internal static void OnSealed(int parts, long readings)
    {
        Sealed.Add(parts);
        Unsealed.Add(-readings);
    }

    internal static void OnRecovered(long readings) => Unsealed.Add(readings);
}
