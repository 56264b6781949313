using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Simulator;
using LabWatch.Simulator.Faults;

namespace LabWatch.Tests.Alerts;

/// <summary>The hazard watch beside the simulated laboratory, whose physics it does not know: what it raises, and what it leaves alone.</summary>
public sealed class DemoHazardTests
{
    // A Wednesday: every source is in use.
    private static readonly Instant Morning = TestSite.Parse("2026-12-02T04:00:00Z");

    [Fact]
    public void A_working_day_without_faults_raises_hot_surfaces_and_unattended_heat_alone()
    {
        WatchBench bench = Watch(new LabSimulation(1, Morning), hours: 14);
        string[] raised = [.. bench.Conditions.Found.Where(found => found.Present).Select(found => found.Key.Code).Distinct()];
        Assert.Empty(raised.Except([HazardCode.HotSurface, HazardCode.UnattendedHot]));
    }

    [Fact]
    public void Lost_argon_over_hot_graphite_is_raised()
    {
        LabSimulation simulation = new(1, TestSite.Parse("2026-12-02T11:00:00Z"));
        simulation.Inject(new FaultOrder("yew", FaultKind.PurgeLoss) { Size = 1 });
        WatchBench bench = Watch(simulation, hours: 0.2);
        Assert.Contains(bench.Conditions.Found, found => found.Key.Code == HazardCode.PurgeLost && found.Key.Source.Source == "yew");
    }

    [Fact]
    public void A_relay_stuck_on_is_raised_before_or_with_the_cut_out()
    {
        LabSimulation simulation = new(1, TestSite.Parse("2026-12-02T11:00:00Z"));
        simulation.Inject(new FaultOrder("rowan", FaultKind.HeaterRelayStuck) { Size = 1 });
        WatchBench bench = Watch(simulation, hours: 2);
        string[] raised = [.. bench.Conditions.Found.Where(found => found.Present && found.Key.Source.Source == "rowan").Select(found => found.Key.Code).Distinct()];
        Assert.Contains(HazardCode.HeaterRunaway, raised);
        Assert.True(Array.IndexOf(raised, HazardCode.HeaterRunaway) < Array.IndexOf(raised, HazardCode.CutoutTripped) || !raised.Contains(HazardCode.CutoutTripped));
    }

    private static WatchBench Watch(LabSimulation simulation, double hours)
    {
        LabFileResult read = LabFileReader.Read(System.Text.Encoding.UTF8.GetBytes(DemoLab.LabFileFor(simulation.Now)));
        LabSnapshot lab = read.Snapshot!;
        WatchBench bench = new(lab);
        for (int i = 0; i < hours * 360; i++)
        {
            simulation.Advance(10);
            bench.Clock.Advance(TimeSpan.FromSeconds(10));
            foreach (string source in LabSimulation.SourceIds)
            {
                bench.Watch.OnPack(new ReadingPack(
                    new SourceKey(DemoLab.Site, source), bench.Now, [.. simulation.Read(source).Select(reading => new Reading(reading.Channel, bench.Now, reading.Value))]));
            }

            bench.Watch.Tick();
        }

        return bench;
    }
}
