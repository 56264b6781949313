using System.Collections.Concurrent;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Simulator;
using LabWatch.Simulator.Faults;

namespace LabWatch.Tests.Simulator;

public sealed class LabSimulationTests
{
    // A Wednesday, when every source is in use.
    private static readonly Instant Morning = Instant.From(new DateTimeOffset(2026, 12, 2, 9, 0, 0, TimeSpan.Zero));
    private static readonly Instant MondayMorning = Instant.From(new DateTimeOffset(2026, 11, 30, 8, 0, 0, TimeSpan.Zero));
    private static readonly Instant Thursday = Instant.From(new DateTimeOffset(2026, 12, 3, 6, 0, 0, TimeSpan.Zero));
    private static readonly LabHistory History = new(1, Morning);
    private static readonly ConcurrentDictionary<Instant, Lazy<LabState>> Settled = new();

    [Fact]
    public void Advance_SameSeedAndCommands_GivesTheSameTelemetryBitForBit()
    {
        LabSimulation first = At(Morning);
        LabSimulation second = At(Morning);
        first.Inject(new FaultOrder("rowan", FaultKind.InsulationDamage) { Onset = TimeSpan.FromSeconds(30) });
        second.Inject(new FaultOrder("rowan", FaultKind.InsulationDamage) { Onset = TimeSpan.FromSeconds(30) });
        first.Advance(600);
        for (int i = 0; i < 60; i++)
        {
            second.Advance(10);
        }

        Assert.All(LabSimulation.SourceIds, source => Assert.Equal(first.Read(source), second.Read(source)));
    }

    [Fact]
    public void Advance_OtherSeed_GivesOtherTelemetry() =>
        Assert.NotEqual(At(Morning).Read("fir"), new LabSimulation(2, Morning).Read("fir"));

    [Fact]
    public void Take_CapturedState_GoesOnBitForBit()
    {
        FaultBook book = new(DemoLab.Designs, []);
        LabSimulation original = At(Morning, book);
        original.Inject(new FaultOrder("fir", FaultKind.ThermometerStuck) { Channel = "well-front" });
        original.Inject(new FaultOrder("yew", FaultKind.HeaterRelayStuck) { Size = 1 });
        original.Advance(2000);
        LabSimulation restored = new(History, book, null);
        restored.Take(original.Capture(), original.Second);
        original.Advance(300);
        restored.Advance(300);

        Assert.All(LabSimulation.SourceIds, source => Assert.Equal(original.Read(source), restored.Read(source)));
        LabSimulation again = new(History, book, null);
        again.Take(original.Capture(), original.Second);
        Assert.All(LabSimulation.SourceIds, source => Assert.Equal(original.Read(source), again.Read(source)));
    }

    [Fact]
    public void Advance_SettledAtTwoTimes_AgreesBetterThanTheReadoutsResolve()
    {
        // What lies before the settling must not show: two simulations that began at different times are at the same temperatures.
        LabSimulation early = new(History, new FaultBook(DemoLab.Designs, []), null);
        early.Settle(LabSimulation.SecondOf(Morning), LabSimulation.SpinUp + TimeSpan.FromHours(12));
        LabSimulation late = new(1, Morning);

        double[] Of(LabSimulation lab) => [.. lab.Sources.SelectMany(source => source.Network.Network.Temperatures[..source.Network.NodeCount].ToArray())];
        Assert.All(Of(early).Zip(Of(late)), pair => Assert.Equal(pair.First, pair.Second, 2e-3));
    }

    [Fact]
    public void Advance_HealthyDay_CasesStayWellBelowBurnThresholdsAndCutOutsRest()
    {
        // A Thursday: rowan goes to 500 degC and yew to 1500 degC.
        LabSimulation lab = At(Thursday);
        for (int i = 0; i < 22; i++)
        {
            lab.Advance(1800);
            foreach (string source in LabSimulation.SourceIds)
            {
                // 48 degC: metal, contact up to 10 min (ISO 13732-1, from memory).
                Assert.InRange(Value(lab, source, "outer-case"), 10, 43);
            }

            Assert.Equal(0, Value(lab, "rowan", "cut-out"));
            Assert.Equal(0, Value(lab, "yew", "cut-out"));
        }

        Assert.InRange(Value(lab, "rowan", "block-indicator"), 498, 502);
        Assert.InRange(Value(lab, "yew", "comparator-0-9"), 1480, 1515);
    }

    [Fact]
    public void Inject_InsulationDamage_MakesTheCaseHotWithinMinutesAndClearCoolsIt()
    {
        LabSimulation lab = At(Morning);
        Assert.Empty(lab.Inject(new FaultOrder("rowan", FaultKind.InsulationDamage) { Size = 8 }));
        lab.Advance(400);
        Assert.True(Value(lab, "rowan", "outer-case") > 55);
        Assert.Empty(lab.Clear(Assert.Single(lab.ActiveFaults).Id));
        lab.Advance(1800);
        Assert.True(Value(lab, "rowan", "outer-case") < 45);
        Assert.Empty(lab.ActiveFaults);
    }

    [Fact]
    public void Inject_ThermometerDrift_MovesThatThermometerAlone()
    {
        (LabSimulation sound, LabSimulation faulty) = Pair(new FaultOrder("fir", FaultKind.ThermometerDrift) { Channel = "bath-indicator", Size = 0.5, Onset = TimeSpan.FromSeconds(100) }, 50);
        Assert.Equal(0.25, Value(faulty, "fir", "bath-indicator") - Value(sound, "fir", "bath-indicator"), 0.012);
        Assert.Equal(Value(sound, "fir", "well-bottom"), Value(faulty, "fir", "well-bottom"));
    }

    [Fact]
    public void Inject_ThermometerStuck_RepeatsTheRawValue()
    {
        LabSimulation lab = At(Morning);
        lab.Inject(new FaultOrder("hazel", FaultKind.ThermometerStuck) { Channel = "well-middle" });
        lab.Advance(1);
        double held = Value(lab, "hazel", "well-middle");
        double other = Value(lab, "hazel", "well-bottom");
        lab.Advance(500);
        Assert.Equal(held, Value(lab, "hazel", "well-middle"));
        Assert.NotEqual(other, Value(lab, "hazel", "well-bottom"));
    }

    [Fact]
    public void Inject_CoatingFall_LowersEveryComparatorAndNoThermometer()
    {
        (LabSimulation sound, LabSimulation faulty) = Pair(new FaultOrder("rowan", FaultKind.CoatingFall) { Size = 0.3 }, 60);
        Assert.True(Value(faulty, "rowan", "comparator-8-14") < Value(sound, "rowan", "comparator-8-14") - 0.05);
        Assert.True(Value(faulty, "rowan", "comparator-3-5") < Value(sound, "rowan", "comparator-3-5") - 0.03);
        Assert.Equal(Value(sound, "rowan", "well-bottom"), Value(faulty, "rowan", "well-bottom"));
    }

    [Fact]
    public void Inject_ComparatorDrift_MovesThatBandAlone()
    {
        (LabSimulation sound, LabSimulation faulty) = Pair(new FaultOrder("rowan", FaultKind.ComparatorDrift) { Channel = "comparator-3-5", Size = -0.4 }, 10);
        Assert.Equal(-0.4, Value(faulty, "rowan", "comparator-3-5") - Value(sound, "rowan", "comparator-3-5"), 0.011);
        Assert.Equal(Value(sound, "rowan", "comparator-8-14"), Value(faulty, "rowan", "comparator-8-14"));
    }

    [Fact]
    public void Inject_PurgeLossBelowTheDewPoint_LetsFrostGrow()
    {
        LabSimulation lab = At(MondayMorning);
        Assert.InRange(Value(lab, "fir", "well-bottom"), 91, 93);
        lab.Inject(new FaultOrder("fir", FaultKind.PurgeLoss));
        lab.Advance(3600);
        Assert.Equal(0, Value(lab, "fir", "purge-flow"));
        Assert.True(Value(lab, "fir", "dew-point") > 0);
        Assert.True(lab.Sources[0].Frost > 0.3);
    }

    [Fact]
    public void Inject_HeaterRelayStuck_HeatsUntilTheCutOutTrips()
    {
        LabSimulation lab = At(Morning);
        lab.Inject(new FaultOrder("rowan", FaultKind.HeaterRelayStuck));
        double before = Value(lab, "rowan", "block-indicator");
        lab.Advance(300);
        Assert.True(Value(lab, "rowan", "block-indicator") > before + 20);
        lab.Advance(3600);
        Assert.Equal(1, Value(lab, "rowan", "cut-out"));
        Assert.Equal(0, Value(lab, "rowan", "heater-power"));
        Assert.InRange(Value(lab, "rowan", "block-indicator"), 380, 560);
    }

    [Fact]
    public void Inject_OpenShutterAtNight_LetsTheComparatorSeeTheCavity()
    {
        LabSimulation lab = At(Morning + TimeSpan.FromHours(14));
        Assert.InRange(Value(lab, "rowan", "comparator-8-14"), 15, 35);
        lab.Inject(new FaultOrder("rowan", FaultKind.OpenShutter));
        lab.Advance(60);
        Assert.Equal(1, Value(lab, "rowan", "shutter"));
        Assert.InRange(Value(lab, "rowan", "comparator-8-14"), 295, 303);
    }

    [Fact]
    public void Inject_SensorSilent_LeavesTheChannelOut()
    {
        LabSimulation lab = At(Morning);
        lab.Inject(new FaultOrder("hazel", FaultKind.SensorSilent) { Channel = "outer-case", Duration = TimeSpan.FromSeconds(60) });
        lab.Advance(1);
        Assert.DoesNotContain(lab.Read("hazel"), reading => reading.Channel == "outer-case");
        lab.Advance(60);
        Assert.Contains(lab.Read("hazel"), reading => reading.Channel == "outer-case");
    }

    [Fact]
    public void Inject_ClockSkew_MovesTheDeviceTimeOfThatSource()
    {
        LabSimulation lab = At(Morning);
        lab.Inject(new FaultOrder("fir", FaultKind.ClockSkew) { Size = -12.5 });
        lab.Advance(10);
        Assert.All(lab.Read("fir"), reading => Assert.Equal(TimeSpan.FromSeconds(-12.5), reading.DeviceTime - lab.Now));
        Assert.All(lab.Read("rowan"), reading => Assert.Equal(lab.Now, reading.DeviceTime));
    }

    [Fact]
    public void Inject_Frost_StaysOnlyWhileTheCavityIsCold()
    {
        LabSimulation lab = At(MondayMorning);
        lab.Inject(new FaultOrder("fir", FaultKind.Frost) { Size = 0.7 });
        lab.Advance(10);
        Assert.Equal(0.7, lab.Sources[0].Frost, 1e-9);
        lab.AdvanceTo(LabSimulation.SecondOf(MondayMorning) + (8 * 3600));
        Assert.Equal(0, lab.Sources[0].Frost);
    }

    [Theory]
    [InlineData("oak", FaultKind.PurgeLoss, null, null, "unknown-source", "source")]
    [InlineData("fir", (FaultKind)99, null, null, "unknown-choice", "kind")]
    [InlineData("fir", FaultKind.ThermometerDrift, "heater-power", null, "unknown-channel", "channel")]
    [InlineData("fir", FaultKind.ThermometerDrift, null, null, "unknown-channel", "channel")]
    [InlineData("fir", FaultKind.PurgeLoss, "purge-flow", null, "not-applicable", "channel")]
    [InlineData("hazel", FaultKind.PurgeLoss, null, null, "not-applicable", "kind")]
    [InlineData("rowan", FaultKind.Frost, null, null, "not-applicable", "kind")]
    [InlineData("fir", FaultKind.OpenShutter, null, null, "not-applicable", "kind")]
    [InlineData("fir", FaultKind.CoatingFall, null, 0.51, "out-of-range", "size")]
    [InlineData("fir", FaultKind.CoatingFall, null, double.NaN, "out-of-range", "size")]
    public void Inject_OrderThatCannotBe_IsAFinding(string source, FaultKind kind, string? channel, double? size, string code, string where)
    {
        Finding finding = Assert.Single(At(Morning).Inject(new FaultOrder(source, kind) { Channel = channel, Size = size }));
        Assert.Equal((code, where), (finding.Code, finding.Where));
    }

    [Fact]
    public void Inject_OrderWithSeveralMistakes_ListsThemAll() =>
        Assert.Equal(
            ["size", "channel", "onset", "duration"],
            At(Morning)
                .Inject(new FaultOrder("fir", FaultKind.ThermometerDrift) { Size = 900, Onset = TimeSpan.FromSeconds(-1), Duration = TimeSpan.Zero })
                .Select(finding => finding.Where));

    [Fact]
    public void Clear_UnknownId_IsAFinding() =>
        Assert.Equal("unknown-fault", Assert.Single(At(Morning).Clear("f-1")).Code);

    [Fact]
    public void Catalogue_HasEveryKindOnce() =>
        Assert.Equal(Enum.GetValues<FaultKind>(), FaultCatalogue.All.Select(traits => traits.Kind));

    [Theory]
    [InlineData("fir", "well-bottom", 2.5, 10)]
    [InlineData("rowan", "well-bottom", 2.7, 30)]
    [InlineData("hazel", "well-bottom", 2.6, 4)]
    [InlineData("yew", "well-bottom", 1, 1200)]
    public void Advance_HealthySource_KeepsItsStabilityLimit(string source, string channel, double kelvinPerUnit, double limitMillikelvin)
    {
        LabSimulation lab = At(Morning + TimeSpan.FromMinutes(30));
        (double lowest, double highest) = (double.MaxValue, double.MinValue);
        for (int i = 0; i < 180; i++)
        {
            lab.Advance(10);
            (lowest, highest) = (Math.Min(lowest, Value(lab, source, channel)), Math.Max(highest, Value(lab, source, channel)));
        }

        Assert.True(1000 * kelvinPerUnit * (highest - lowest) / 2 < limitMillikelvin);
    }

    [Fact]
    public void Schedule_AfterTheLiveStart_BringsAFaultWithinMinutes()
    {
        FaultSchedule schedule = new(1, DemoLab.Designs, Morning);
        Assert.Empty(schedule.At(Morning));
        ActiveFault fault = Assert.Single(schedule.At(Morning + TimeSpan.FromMinutes(5)));
        Assert.Equal(("rowan", FaultKind.InsulationDamage), (fault.Order.Source, fault.Order.Kind));
        Assert.Empty(schedule.At(fault.End!.Value));
    }

    [Theory]
    [InlineData(0)] // Wednesday morning, rowan at 100 degC
    [InlineData(2)] // on its way up
    [InlineData(88)] // in the night to Sunday
    public void Schedule_FirstFault_BringsAHotSurfaceWheneverTheDemoStarts(int hoursLater)
    {
        Instant start = Morning + TimeSpan.FromHours(hoursLater);
        LabState settled = At(start).Capture();
        LabSimulation lab = new(History, new FaultBook(DemoLab.Designs, []), new FaultSchedule(1, DemoLab.Designs, start));
        lab.Take(settled, settled.Second);
        lab.Advance(140);
        Assert.InRange(Value(lab, "rowan", "outer-case"), 20, 45);
        lab.Advance(400);
        Assert.InRange(Value(lab, "rowan", "outer-case"), 65, 130);
        lab.Advance(2400);
        Assert.InRange(Value(lab, "rowan", "outer-case"), 20, 48);
    }

    [Fact]
    public void Schedule_OfEverySlot_HasOrdersThatCanBe()
    {
        FaultSchedule schedule = new(4, DemoLab.Designs, Morning);
        HashSet<FaultKind> seen = [];
        for (int minute = 0; minute < 40 * 1440; minute += 5)
        {
            foreach (ActiveFault fault in schedule.At(Morning + TimeSpan.FromMinutes(minute)))
            {
                Assert.Empty(FaultChecks.Check(fault.Order, DemoLab.Designs));
                seen.Add(fault.Order.Kind);
            }
        }

        Assert.True(seen.Count >= 6);
    }

    private static (LabSimulation Sound, LabSimulation Faulty) Pair(FaultOrder order, int seconds)
    {
        LabSimulation sound = At(Morning);
        LabSimulation faulty = At(Morning);
        Assert.Empty(faulty.Inject(order));
        sound.Advance(seconds + 1);
        faulty.Advance(seconds + 1);
        return (sound, faulty);
    }

    // Settling takes most of a test's time; each moment is settled once, over some hours, and taken from there.
    private static LabSimulation At(Instant at, FaultBook? book = null)
    {
        LabState state = Settled.GetOrAdd(at, moment => new Lazy<LabState>(() =>
        {
            LabSimulation lab = new(History, new FaultBook(DemoLab.Designs, []), null);
            lab.Settle(LabSimulation.SecondOf(moment), TimeSpan.FromHours(5));
            return lab.Capture();
        })).Value;
        LabSimulation taken = new(History, book ?? new FaultBook(DemoLab.Designs, []), null);
        taken.Take(state, state.Second);
        return taken;
    }

    private static double Value(LabSimulation lab, string source, string channel) => lab.Read(source).Single(reading => reading.Channel == channel).Value;
}
