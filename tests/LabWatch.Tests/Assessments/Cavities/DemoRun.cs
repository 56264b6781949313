using System.Text;
using LabWatch.Assessments;
using LabWatch.Assessments.Cavities;
using LabWatch.Lab;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Simulator;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Assessments.Cavities;

/// <summary>The simulated laboratory with its lab file: readings of a span, judged by a criterion without a store between.</summary>
internal sealed class DemoRun
{
    /// <summary>Models that several tests share, without a folder.</summary>
    public static readonly ICavityModels Models = new CavityModels(new CavityTraces(null, NullLogger<CavityTraces>.Instance));

    private readonly Dictionary<string, Dictionary<string, List<(long Time, double Value, ReadingQuality Quality)>>> _readings = [];

    public DemoRun(long seed, Instant start)
    {
        Simulation = new LabSimulation(seed, start);
        Lab = LabFileReader.Read(Encoding.UTF8.GetBytes(DemoLab.LabFileFor(start))).Snapshot!;
    }

    public LabSimulation Simulation { get; }

    public LabSnapshot Lab { get; }

    public ReferenceSource Source(string id) => Lab.Sources.Single(source => source.Key.Source == id);

    /// <summary>Runs up to an instant and keeps a reading of every channel of some sources each 10 s.</summary>
    public void RunUntil(Instant until, params ReadOnlySpan<string> sources)
    {
        while (Simulation.Now < until)
        {
            Simulation.Advance(10);
            foreach (string source in sources)
            {
                Keep(source);
            }
        }
    }

    /// <summary>Passes time without keeping readings.</summary>
    public void SkipUntil(Instant until) => Simulation.Advance((int)(until - Simulation.Now).TotalSeconds);

    public IReadOnlyList<CriterionResult> Evaluate(ICriterion criterion, string source, Instant end)
    {
        TimeWindow window = criterion.Schedule.EndingAt(end), span = criterion.Schedule.SpanOf(window);
        return criterion.Evaluate(new CriterionInput(Lab, Source(source), window, Read(source, criterion.Channels(Source(source)), span)));
    }

    public ReadingWindow Read(string source, IReadOnlyList<string> channels, TimeWindow span)
    {
        List<ReadingSeries> series = [];
        foreach (string channel in channels.Where(_readings[source].ContainsKey))
        {
            var kept = _readings[source][channel].Where(reading => span.Contains(new Instant(reading.Time))).ToList();
            series.Add(new(
                channel, kept.Select(reading => reading.Time).ToArray(), kept.Select(reading => reading.Value).ToArray(), kept.Select(reading => reading.Quality).ToArray()));
        }

        return new(Source(source).Key, span, [.. series.Where(one => one.Count > 0)], [new SourceHourRead(span.Start.StartOfHour(), 1)]);
    }

    private void Keep(string source)
    {
        Dictionary<string, List<(long, double, ReadingQuality)>> channels = _readings.TryGetValue(source, out var known) ? known : _readings[source] = [];
        foreach (SimulatedReading reading in Simulation.Read(source))
        {
            Channel channel = Source(source).FindChannel(reading.Channel)!;
            bool outside = reading.Value < channel.SensorMinimum || reading.Value > channel.SensorMaximum;
            List<(long, double, ReadingQuality)> list = channels.TryGetValue(reading.Channel, out var kept) ? kept : channels[reading.Channel] = [];
            list.Add((reading.DeviceTime.Microseconds, reading.Value, outside ? ReadingQuality.OutsideSensorRange : ReadingQuality.None));
        }
    }
}
