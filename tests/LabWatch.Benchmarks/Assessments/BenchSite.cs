using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Simulator;

namespace LabWatch.Benchmarks.Assessments;

/// <summary>The demo's four sources, each many times under other names, and what they send.</summary>
/// <param name="Snapshot">The site.</param>
/// <param name="Models">The demo's source that each source is a copy of.</param>
internal sealed record BenchSite(LabSnapshot Snapshot, IReadOnlyDictionary<SourceKey, string> Models)
{
    /// <summary>A working morning in the demo's first days: every source is on.</summary>
    public static Instant Morning { get; } = Instant.From(new DateTimeOffset(2026, 12, 2, 9, 0, 0, TimeSpan.Zero));

    /// <summary>A site of a number of sources.</summary>
    public static BenchSite Of(int sources, Instant start)
    {
        LabSnapshot demo = LabFileReader.Read(System.Text.Encoding.UTF8.GetBytes(DemoLab.LabFileFor(start))).Snapshot ?? throw new InvalidOperationException("The demo's lab file has findings.");
        List<(ReferenceSource Source, string Suffix)> copies =
            [.. Enumerable.Range(0, sources).Select(i => (demo.Sources[i % demo.Sources.Count], sources <= demo.Sources.Count ? string.Empty : FormattableString.Invariant($"-{i}")))];
        LabSnapshot snapshot = new(
            demo.Site,
            [.. copies.Select(copy => Copy(copy.Source, copy.Suffix))],
            [.. copies.SelectMany(copy => Instruments(demo, copy.Source).Select(instrument => instrument with { Id = instrument.Id + copy.Suffix }))],
            [.. copies.SelectMany(copy => Stays(demo, copy.Source).Select(stay => stay with { Instrument = stay.Instrument + copy.Suffix, Channel = Key(stay.Channel, copy.Suffix) }))],
            [.. copies.SelectMany(copy => Instruments(demo, copy.Source).SelectMany(instrument => demo.Certificates
                .Where(certificate => certificate.Instrument == instrument.Id)
                .Select(certificate => certificate with { Id = certificate.Id + copy.Suffix, Instrument = certificate.Instrument + copy.Suffix })))],
            [.. copies.SelectMany(copy => demo.Limits.Where(limit => limit.Source == copy.Source.Key).Select(limit => limit with { Id = limit.Id + copy.Suffix, Source = Key(limit.Source, copy.Suffix) }))],
            demo.Notifiers);
        return new(snapshot, copies.ToDictionary(copy => Key(copy.Source.Key, copy.Suffix), copy => copy.Source.Key.Source));
    }

    /// <summary>Packs of the demo's four sources from an instant on, one each 10 s, by the demo's names.</summary>
    public static IEnumerable<ReadingPack> Packs(Instant from, TimeSpan duration)
    {
        LabSimulation lab = new(1, from);
        for (Instant time = from; time < from + duration; time += TimeSpan.FromSeconds(10))
        {
            foreach (string source in LabSimulation.SourceIds)
            {
                yield return new ReadingPack(
                    new SourceKey(DemoLab.Site, source), time, [.. lab.Read(source).Select(reading => new Reading(reading.Channel, reading.DeviceTime, reading.Value))]);
            }

            lab.Advance(10);
        }
    }

    /// <summary>The readings of packs as the store gives them, by the demo's name of the source.</summary>
    public static IReadOnlyDictionary<string, ReadingWindow> Windows(IEnumerable<ReadingPack> packs, TimeWindow window) => packs
        .GroupBy(pack => pack.Source)
        .ToDictionary(group => group.Key.Source, group => new ReadingWindow(
            group.Key,
            window,
            [.. group.SelectMany(pack => pack.Readings).GroupBy(reading => reading.Channel, StringComparer.Ordinal).OrderBy(channel => channel.Key, StringComparer.Ordinal).Select(Series)],
            [new(window.Start.StartOfHour(), 1)]));

    private static ReadingSeries Series(IGrouping<string, Reading> channel)
    {
        Reading[] readings = [.. channel.Where(reading => !double.IsNaN(reading.Value))];
        return new(
            channel.Key, readings.Select(reading => reading.Time.Microseconds).ToArray(), readings.Select(reading => reading.Value).ToArray(), new ReadingQuality[readings.Length]);
    }

    private static ReferenceSource Copy(ReferenceSource source, string suffix) => source with
    {
        Key = Key(source.Key, suffix),
        Channels = [.. source.Channels.Select(channel => channel with { Key = Key(channel.Key, suffix) })],
    };

    private static SourceKey Key(SourceKey key, string suffix) => new(key.Site, key.Source + suffix);

    private static ChannelKey Key(ChannelKey key, string suffix) => new(Key(key.Source, suffix), key.Channel);

    private static IEnumerable<Installation> Stays(LabSnapshot demo, ReferenceSource source) => demo.Installations.Where(stay => stay.Channel.Source == source.Key);

    private static IEnumerable<Instrument> Instruments(LabSnapshot demo, ReferenceSource source) =>
        demo.Instruments.Where(instrument => Stays(demo, source).Any(stay => stay.Instrument == instrument.Id));
}
