using System.Text;
using LabWatch.Lab.Time;
using LabWatch.Simulator;
using LabWatch.Simulator.Demo;
using LabWatch.Simulator.Faults;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Simulator;

public sealed class DemoEngineTests : IDisposable
{
    private static readonly DateTimeOffset Start = new(2026, 12, 2, 9, 0, 0, TimeSpan.Zero);

    private readonly string _directory = Directory.CreateTempSubdirectory("labwatch-demo-").FullName;
    private readonly FakeTimeProvider _clock = new(Start);

    public void Dispose() => Directory.Delete(_directory, recursive: true);

    [Fact]
    public void ResumeLive_FirstStart_JoinsTheEndOfTheHistoryWithoutAHole()
    {
        DemoEngine engine = Open(days: 1);
        HistorySegment history = engine.NextHistory()!;
        _clock.Advance(TimeSpan.FromSeconds(20));
        LabSimulation live = engine.ResumeLive(Instant.Now(_clock));

        Assert.True(engine.IsFirstStart);
        Assert.Equal(history.To, live.Second + 1);
        Assert.Equal(86400, history.To - history.From);
    }

    [Fact]
    public void ResumeLive_AfterACrash_RepeatsTheSameReadings()
    {
        DemoEngine before = Open(days: 0);
        LabSimulation live = before.ResumeLive(Instant.Now(_clock));
        live.AdvanceTo(live.Second + 10);
        before.LiveDone(live.Capture());
        Assert.Empty(before.Inject(new FaultOrder("fir", FaultKind.ThermometerDrift) { Channel = "well-front", Size = 1 }));
        IReadOnlyList<string> sent = Packs(live, 20);

        _clock.Advance(TimeSpan.FromSeconds(40));
        DemoEngine after = Open(days: 0);
        LabSimulation again = after.ResumeLive(Instant.Now(_clock));

        Assert.False(after.IsFirstStart);
        Assert.Equal(sent, Packs(again, 20));
        Assert.Equal("f-1", Assert.Single(after.ActiveFaults).Id);
    }

    [Fact]
    public void ResumeLive_AfterHours_MakesHistoryOfTheTimeBetweenThatAgreesWithBothEnds()
    {
        DemoEngine before = Open(days: 0);
        LabSimulation live = before.ResumeLive(Instant.Now(_clock));
        live.AdvanceTo(live.Second + 30);
        before.LiveDone(live.Capture());
        long reached = live.Second;

        _clock.Advance(TimeSpan.FromHours(2));
        DemoEngine after = Open(days: 0);
        LabSimulation resumed = after.ResumeLive(Instant.Now(_clock));
        HistorySegment gap = after.NextHistory()!;
        LabSimulation filler = after.ResumeHistory(gap);

        Assert.Equal((reached, reached), (gap.From, gap.DoneUpTo));
        Assert.Equal(gap.To, resumed.Second + 1);
        live.AdvanceTo(reached + 100);
        filler.AdvanceTo(reached + 100);
        Assert.Equal(live.Read("rowan"), filler.Read("rowan"));
        filler.AdvanceTo(resumed.Second);
        Assert.Equal(filler.Read("rowan"), resumed.Read("rowan"));
    }

    [Fact]
    public void HistoryDone_Restart_GoesOnWhereItWasAlike()
    {
        DemoEngine before = Open(days: 1);
        HistorySegment segment = before.NextHistory()!;
        LabSimulation lane = before.ResumeHistory(segment);
        lane.AdvanceTo(segment.From + 1200);
        before.HistoryDone(segment, lane.Capture(), keep: true);
        lane.AdvanceTo(segment.From + 1210);

        DemoEngine after = Open(days: 1);
        HistorySegment rest = after.NextHistory()!;
        LabSimulation again = after.ResumeHistory(rest);
        again.AdvanceTo(segment.From + 1210);

        Assert.Equal(segment.From + 1200, rest.DoneUpTo);
        Assert.Equal(1200.0 / 86399, after.Current.Fraction, 1e-9);
        Assert.All(LabSimulation.SourceIds, source => Assert.Equal(lane.Read(source), again.Read(source)));
    }

    [Fact]
    public void HistoryDone_ToTheEnd_IsDone()
    {
        DemoEngine engine = Open(days: 1);
        HistorySegment segment = engine.NextHistory()!;
        Assert.Equal(0, engine.Current.Fraction);
        LabState end = engine.ResumeHistory(segment).Capture() with { Second = segment.To - 1 };
        engine.HistoryDone(segment, end, keep: true);

        Assert.Null(engine.NextHistory());
        Assert.Equal(new HistoryProgress(1, Instant.FromUnixSeconds(segment.From), Instant.FromUnixSeconds(segment.To), Done: true), engine.Current);
        Assert.Null(Open(days: 1).NextHistory());
    }

    [Fact]
    public void Open_OtherSeedAndDays_GoesOnWithTheFirstOnes()
    {
        Open(days: 0);
        DemoEngine again = new(new DemoOptions(5, 99, "127.0.0.1", 1883, _directory), _clock);
        Assert.Equal(1, again.State.Seed);
        Assert.Null(again.NextHistory());
    }

    [Fact]
    public void Open_StateThatIsNoState_SaysWhatToDo()
    {
        Open(days: 0);
        File.WriteAllText(Path.Combine(_directory, "demo", "state.json"), "{ \"format\": 1, ");
        Assert.Contains("another data directory", Assert.Throws<InvalidDataException>(() => Open(days: 0)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Inject_BeforeTheStart_IsAFinding() =>
        Assert.Equal("not-started", Assert.Single(Open(days: 0).Inject(new FaultOrder("fir", FaultKind.PurgeLoss))).Code);

    [Fact]
    public void Validate_EverythingWrong_ListsEverything() =>
        Assert.Equal(
            ["days", "host", "mqtt-port", "data", "topic-root"],
            new DemoOptions(-1, 1, " ", 0, "") { TopicRoot = "a/#" }.Validate().Select(finding => finding.Where));

    private DemoEngine Open(int days) => new(new DemoOptions(days, 1, "127.0.0.1", 1883, _directory), _clock);

    private static List<string> Packs(LabSimulation lab, int seconds)
    {
        SenmlWriter writer = new(DemoLab.Designs);
        List<string> packs = [];
        long end = lab.Second + seconds;
        while (lab.Second < end)
        {
            lab.Produce(lab.Second + 1, writer, (_, pack) => packs.Add(Encoding.UTF8.GetString(pack)));
        }

        return packs;
    }
}
