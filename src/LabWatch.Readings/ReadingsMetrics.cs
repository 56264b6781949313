using System.Diagnostics.Metrics;

namespace LabWatch.Readings;

/// <summary>Figures of the store of readings for whoever listens, under the meter <see cref="MeterName"/>.</summary>
public static class ReadingsMetrics
{
    /// <summary>Name of the meter.</summary>
    public const string MeterName = "LabWatch.Readings";

    private static readonly Meter _meter = new(MeterName);
    private static readonly Counter<long> _accepted = _meter.CreateCounter<long>("labwatch.readings.accepted", "{reading}", "Readings made durable.");
    private static readonly Counter<long> _duplicates = _meter.CreateCounter<long>("labwatch.readings.duplicates", "{reading}", "Readings that were there already with the same value.");
    private static readonly Counter<long> _conflicts = _meter.CreateCounter<long>("labwatch.readings.conflicts", "{reading}", "Readings refused because another value stands for their identity.");
    private static readonly Histogram<double> _commit = _meter.CreateHistogram<double>("labwatch.readings.commit.duration", "s", "Time of a durable commit.");
    private static readonly Counter<long> _sealed = _meter.CreateCounter<long>("labwatch.readings.sealed_parts", "{part}", "Parts of source-hours sealed.");
    private static readonly UpDownCounter<long> _unsealed = _meter.CreateUpDownCounter<long>("labwatch.readings.unsealed", "{reading}", "Readings in memory that are not sealed yet.");
    private static readonly UpDownCounter<long> _journal = _meter.CreateUpDownCounter<long>("labwatch.readings.journal.size", "By", "Bytes of the journal rows.");

    internal static void OnJournal(long change) => _journal.Add(change);

    internal static void OnAppended(int accepted, int duplicates, int conflicts, TimeSpan duration)
    {
        _accepted.Add(accepted);
        _duplicates.Add(duplicates);
        _conflicts.Add(conflicts);
        _commit.Record(duration.TotalSeconds);
        _unsealed.Add(accepted);
    }

    internal static void OnSealed(int parts, long readings)
    {
        _sealed.Add(parts);
        _unsealed.Add(-readings);
    }

    internal static void OnRecovered(long readings) => _unsealed.Add(readings);
}
