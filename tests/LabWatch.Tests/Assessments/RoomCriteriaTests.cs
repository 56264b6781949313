using System.Text;
using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Simulator;
using LabWatch.Simulator.Faults;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments;

/// <summary>Room and purge gas, against published vapour pressures and the simulator's purge and frost.</summary>
public sealed class RoomCriteriaTests
{
    /// <summary>Monday 2026-11-02: fir stands at -20 degC from 04:30 to 10:00 UTC.</summary>
    private static readonly Instant Monday = Instant.FromUnixSeconds(1_793_577_600);
    private static readonly PurgeCriterion Purge = new(PurgeCriterion.DefaultSchedule);
    private static readonly SurroundingsCriterion Surroundings = new(SurroundingsCriterion.DefaultSchedule);
    private static readonly LabSnapshot Demo = LabFileReader.Read(Encoding.UTF8.GetBytes(DemoLab.LabFileFor(Monday))).Snapshot!;

    [Theory]
    [InlineData(22, 45, 10, Decision.Pass)]
    [InlineData(25, 45, 75, Decision.Pass)]
    [InlineData(26.5, 45, 112.5, Decision.Fail)]
    [InlineData(22, 72.5, 110, Decision.Fail)]
    public void A_condition_at_the_edge_of_its_range_is_at_100_percent(double air, double humidity, double percent, Decision decision)
    {
        CriterionResult result = Evaluate(Surroundings, "fir", ("ambient", _ => air), ("humidity", _ => humidity));
        Assert.Equal(percent > 10 ? percent : 0, result.Value.Value, 1e-9);
        Assert.Equal(decision, result.Decision);
        Assert.Contains("permitted 18 to 26 degC", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_condition_that_nobody_measures_is_not_decided()
    {
        CriterionResult result = Evaluate(Surroundings, "fir", ("ambient", _ => 22));
        Assert.Equal(Decision.NotDecided, result.Decision);
        Assert.Contains("humidity has readings in 0 of 6 parts of the window", result.Explanation, StringComparison.Ordinal);
    }

    [Theory]
    // Smithsonian Meteorological Tables (Goff-Gratch), saturation over ice: 1.032 hPa at -20 degC, 0.8502 hPa at -22 degC, 0.3798 hPa at -30 degC.
    [InlineData(-20, -22, 82.4, false)]
    [InlineData(-20, -30, 36.8, false)]
    // Over water: 23.37 hPa at 20 degC, 12.27 hPa at 10 degC.
    [InlineData(20, 10, 52.5, false)]
    [InlineData(-20, -21, 90.8, true)]
    public void The_humidity_at_the_coldest_wall_is_the_ratio_of_published_vapour_pressures(double wall, double dewPoint, double percent, bool tooNear)
    {
        CriterionResult result = Evaluate(Purge, "fir", ("bath-indicator", _ => wall), ("dew-point", _ => dewPoint), ("purge-flow", _ => 6));
        Assert.Equal(percent, result.Value.Value, 0.15);
        Assert.Equal(dewPoint - wall, CriterionResult.Figure(result.Figures, "dew-point-excess"), 0.03);
        Assert.Equal(tooNear, result.Explanation.Contains("and 2 K are asked for", StringComparison.Ordinal));
        Assert.Equal(percent > 80 ? Decision.Fail : Decision.Pass, result.Decision);
    }

    [Fact]
    public void Less_than_two_kelvin_fails_whatever_the_limit()
    {
        LabSnapshot lenient = Demo.With(limit: item => item.Criterion == "purge" ? item with { Maximum = 99 } : item);
        CriterionResult result = Evaluate(lenient, Purge, "fir", ("bath-indicator", _ => -20), ("dew-point", _ => -21), ("purge-flow", _ => 6));
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.StartsWith("Fails: the dew or frost point lies only ", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Without_a_sensor_at_the_aperture_the_qualified_flow_holds_its_dew_point_and_less_flow_does_not()
    {
        (string, Func<Instant, double>)[] room = [("ambient", _ => 22), ("humidity", _ => 50), ("well-bottom", _ => 20)];
        CriterionResult held = Evaluate(Purge, "yew", [.. room, ("purge-flow", _ => 4)]);
        Assert.Equal(-40, CriterionResult.Figure(held.Figures, "dew-point"));
        Assert.Contains("by the qualified flow", held.Explanation, StringComparison.Ordinal);
        // 50 %RH at 22 degC: dew point 11.1 degC (WMO-No. 8, Magnus formula over water).
        CriterionResult lost = Evaluate(Purge, "yew", [.. room, ("purge-flow", _ => 0)]);
        Assert.Equal(11.1, CriterionResult.Figure(lost.Figures, "dew-point"), 0.05);
        Assert.Contains("by the air of the room", lost.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_cavity_that_oxygen_damages_fails_when_it_is_hot_without_its_purge()
    {
        CriterionResult result = Evaluate(Purge, "yew", ("ambient", _ => 22), ("humidity", _ => 40), ("well-bottom", _ => 900), ("purge-flow", time => time < Monday - TimeSpan.FromMinutes(10) ? 4 : 1));
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.Contains("the cavity was above 400 degC with less than 3 l/min of purge for 10 min", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void Frost_in_the_simulated_bath_fails_and_stays_until_it_has_been_warmed_in_dry_gas()
    {
        DemoRun run = new(3, Monday);
        run.SkipUntil(Monday + TimeSpan.FromHours(5.5));
        run.RunUntil(Monday + TimeSpan.FromHours(7), "fir");
        Assert.Equal(Decision.Pass, run.Evaluate(Purge, "fir", Monday + TimeSpan.FromHours(7))[0].Decision);
        Assert.Empty(run.Simulation.Inject(new FaultOrder("fir", FaultKind.PurgeLoss) { Size = 1 }));
        run.RunUntil(Monday + TimeSpan.FromHours(8), "fir");
        Assert.Contains("water settles there", run.Evaluate(Purge, "fir", Monday + TimeSpan.FromHours(8))[0].Explanation, StringComparison.Ordinal);
        Assert.Empty(run.Simulation.Clear(run.Simulation.ActiveFaults.Single(fault => fault.Order.Source == "fir").Id));
        run.RunUntil(Monday + TimeSpan.FromHours(9.5), "fir");
        CriterionResult dry = run.Evaluate(Purge, "fir", Monday + TimeSpan.FromHours(9.5))[0];
        Assert.Equal(Decision.Fail, dry.Decision);
        Assert.StartsWith("Fails: frost may stand on the walls", dry.Explanation, StringComparison.Ordinal);
        run.RunUntil(Monday + TimeSpan.FromHours(15), "fir");
        Assert.Equal(Decision.Pass, run.Evaluate(Purge, "fir", Monday + TimeSpan.FromHours(15))[0].Decision);
    }

    [Fact]
    public void A_furnace_without_purge_gas_is_not_judged_by_it() => Assert.Empty(Purge.Channels(Demo.Sources.Single(source => source.Key.Source == "rowan")));

    private static CriterionResult Evaluate(ICriterion criterion, string id, params (string Channel, Func<Instant, double> Value)[] channels) => Evaluate(Demo, criterion, id, channels);

    private static CriterionResult Evaluate(LabSnapshot lab, ICriterion criterion, string id, params (string Channel, Func<Instant, double> Value)[] channels)
    {
        TimeWindow window = criterion.Schedule.EndingAt(Monday), span = criterion.Schedule.SpanOf(window);
        ReferenceSource source = lab.Sources.Single(item => item.Key.Source == id);
        FakeReadingStore store = new();
        foreach ((string channel, Func<Instant, double> value) in channels)
        {
            store.Add(source.Key, TestLab.WellReadings(span.Start, span.End, value).Select(reading => reading with { Channel = channel }));
        }

        return criterion.Evaluate(new(lab, source, window, store.Read(source.Key, criterion.Channels(source), span)))[0];
    }
}
