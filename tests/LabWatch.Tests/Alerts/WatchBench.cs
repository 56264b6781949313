using LabWatch.Alerts;
using LabWatch.Alerts.Hazards;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Alerts;

/// <summary>A hazard watch with a clock in the test's hand.</summary>
internal sealed class WatchBench
{
    public WatchBench(LabSnapshot lab, AlertsOptions? options = null, IReadOnlyDictionary<ChannelKey, Instant>? heard = null)
    {
        Clock = new SteppingClock(TestSite.Start.ToDateTimeOffset());
        Options = options ?? new AlertsOptions { DataDirectory = "unused" };
        Watch = new HazardWatch(Options, Clock, Conditions, heard ?? new Dictionary<ChannelKey, Instant>(), NullLogger<HazardWatch>.Instance);
        Watch.Apply(lab);
    }

    public SteppingClock Clock { get; }

    public AlertsOptions Options { get; }

    public ConditionList Conditions { get; } = new();

    public HazardWatch Watch { get; }

    public Instant Now => Instant.Now(Clock);

    public IEnumerable<(string Code, bool Present)> Edges => Conditions.Edges;

    public void Send(double value, TimeSpan age = default, ReadingQuality quality = ReadingQuality.None, string channel = "case", SourceKey? source = null) =>
        Watch.OnPack(new ReadingPack(source ?? TestSite.Rowan, Now, [new Reading(channel, Now - age, value, quality)]));

    /// <summary>Lets seconds pass one by one, with a reading at the end of each where a value is given.</summary>
    public void Pass(int seconds, double? value = null)
    {
        for (int i = 0; i < seconds; i++)
        {
            Clock.Advance(TimeSpan.FromSeconds(1));
            if (value is { } sent)
            {
                Send(sent);
            }

            Watch.Tick();
        }
    }
}
