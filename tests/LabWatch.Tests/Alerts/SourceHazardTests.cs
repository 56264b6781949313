using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Tests.Alerts;

/// <summary>
/// The hazards that a source's channels tell. Limits: oxygen 29 CFR 1910.134(b), 19.5 % (from memory); cold: the frostbite criterion of ISO 13732-3,
/// 0 degC (from memory); the others common practice, no source, or the laboratory's own.
/// </summary>
public sealed class SourceHazardTests
{
    [Fact]
    public void A_source_at_ease_raises_nothing()
    {
        HazardBench bench = new();
        bench.Pass(700);
        Assert.Empty(bench.Edges);
    }

    [Theory]
    [InlineData("well-2", 510, 500, HazardCode.OverTemperature, 0)]
    [InlineData("case", 0, 3, HazardCode.ColdSurface, 0)]
    [InlineData("cut-out", 1, 0, HazardCode.CutoutTripped, 0)]
    [InlineData("oxygen", 0.1949, 0.199, HazardCode.OxygenLow, 0)]
    [InlineData("level", 49, 60, HazardCode.BathFault, 10)]
    [InlineData("dew-point", 23.1, 20, HazardCode.Condensation, 30)]
    public void It_is_raised_after_its_delay_and_returns_after_the_off_delay(string channel, double bad, double good, string code, int delay)
    {
        HazardBench bench = new();
        bench.Pass(2);
        bench[channel] = bad;
        bench.Pass(1);
        bench.Pass(delay);
        Assert.Equal([(code, true)], bench.Edges);
        Assert.Equal(AlertPriority.High, bench.Found[0].Priority);
        bench[channel] = good;
        bench.Pass(29);
        Assert.Single(bench.Edges);
        bench.Pass(2);
        Assert.Equal([(code, true), (code, false)], bench.Edges);
    }

    [Theory]
    [InlineData("well-2", 509.9)]
    [InlineData("case", 0.1)]
    [InlineData("oxygen", 0.1951)]
    [InlineData("level", 51)]
    [InlineData("dew-point", 22.9)]
    public void Just_inside_the_limit_nothing_is_raised(string channel, double value)
    {
        HazardBench bench = new(new HazardLimits { UnattendedMinutes = 10_000 });
        bench[channel] = value;
        bench.Pass(60);
        Assert.Empty(bench.Edges);
    }

    [Theory]
    [InlineData("purge", 0.05, 420, HazardCode.PurgeLost)]
    [InlineData("cooling", 0.001, 80, HazardCode.CoolingLost)]
    [InlineData("stirrer", 10, 80, HazardCode.BathFault)]
    public void A_missing_flow_is_a_hazard_only_while_hot(string channel, double flow, double hot, string code)
    {
        HazardBench bench = new(new HazardLimits { FlashPointCelsius = null });
        bench[channel] = flow;
        bench.Pass(60);
        Assert.Empty(bench.Edges);
        bench["well-1"] = hot;
        bench.Pass(12);
        Assert.Equal([(code, true)], bench.Edges);
    }

    [Fact]
    public void Heating_counts_as_hot_before_the_thermometer_shows_it()
    {
        HazardBench bench = new();
        bench["stirrer"] = 0;
        bench["heater"] = 0.5;
        bench.Pass(12);
        Assert.Contains((HazardCode.BathFault, true), bench.Edges);
    }

    [Fact]
    public void A_thermometer_that_falls_silent_while_hot_makes_nothing_cold()
    {
        HazardBench bench = new();
        bench["well-1"] = 450;
        bench.Pass(3);
        bench["well-1"] = double.NaN;
        bench["purge"] = 0;
        bench.Pass(12);
        Assert.Contains((HazardCode.PurgeLost, true), bench.Edges);
    }

    [Fact]
    public void A_bath_near_its_flash_point_is_a_fault()
    {
        HazardBench bench = new(new HazardLimits { FlashPointCelsius = 120 }, SourceKind.StirredBath);
        bench["well-2"] = 110;
        bench.Pass(1);
        Assert.Equal([(HazardCode.BathFault, true)], bench.Edges);
        Assert.Contains("Fire hazard", bench.Found[0].Headline, StringComparison.Ordinal);
    }

    [Fact]
    public void Without_a_sensor_at_the_aperture_the_rooms_air_counts_unless_purge_is_confirmed()
    {
        // WMO No. 8, Magnus form over water: air of 23 degC and 40 %RH has a dew point of 8.7 degC, so a wall at 10 degC is within 2 K of it.
        HazardBench bench = new(new HazardLimits { PurgeMinimumLitrePerMinute = 3 }, SourceKind.StirredBath, "dew-point");
        bench["well-2"] = 10;
        bench.Pass(60);
        Assert.Empty(bench.Edges);
        bench["purge"] = 1;
        bench.Pass(32);
        Assert.Equal([(HazardCode.Condensation, true)], bench.Edges);
        Assert.Equal(8.7, bench.Found[0].Value!.Value, 0.1);
    }

    [Fact]
    public void Heated_above_the_set_point_and_still_rising_is_a_runaway()
    {
        HazardBench bench = new();
        bench["set-point"] = 200;
        bench["heater"] = 1;
        bench.Pass(200, second => bench["well-1"] = 210 + (0.02 * second));
        AlertCondition found = Assert.Single(bench.Found, condition => condition.Key.Code == HazardCode.HeaterRunaway);
        Assert.Contains("Heater out of control?", found.Headline, StringComparison.Ordinal);
        bench["heater"] = 0;
        bench.Pass(300);
        Assert.Contains((HazardCode.HeaterRunaway, false), bench.Edges);
    }

    [Fact]
    public void Cooling_towards_a_lower_set_point_is_none()
    {
        HazardBench bench = new();
        bench["set-point"] = 100;
        bench.Pass(400, second => bench["well-1"] = 210 - (0.02 * second));
        Assert.Empty(bench.Edges);
    }

    [Theory]
    [InlineData(1.0, 0.0, "Thermometer out of its well?")]
    [InlineData(0.0, 0.02, "Relay stuck, or power not seen?")]
    public void A_thermometer_that_contradicts_the_energy_balance_is_a_runaway(double kilowatt, double kelvinPerSecond, string words)
    {
        HazardBench bench = new(new HazardLimits { HeatCapacityJoulePerKelvin = 5000, LossWattPerKelvin = 1, UnattendedMinutes = 10_000 });
        bench["set-point"] = 400;
        bench["heater"] = kilowatt;
        bench.Pass(650, second => bench["well-1"] = 40 + (kelvinPerSecond * second));
        Assert.Contains(words, Assert.Single(bench.Found, condition => condition.Key.Code == HazardCode.HeaterRunaway).Headline, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0.7)]
    [InlineData(1.0)]
    [InlineData(1.3)]
    public void A_source_that_heats_as_it_should_is_none_even_where_the_loss_is_stated_thirty_percent_off(double factor)
    {
        HazardBench bench = new(new HazardLimits { HeatCapacityJoulePerKelvin = 5000, LossWattPerKelvin = 1 * factor, UnattendedMinutes = 10_000 });
        bench["set-point"] = 480;
        bench["heater"] = 0.45;
        bench.Pass(5000, second => bench["well-1"] = 23 + (450 * (1 - Math.Exp(-second / 5000.0))));
        Assert.DoesNotContain(bench.Found, condition => condition.Key.Code == HazardCode.HeaterRunaway);
    }

    [Fact]
    public void A_hot_source_that_nobody_looks_after_is_raised_when_its_time_is_over_and_attention_ends_it()
    {
        HazardBench bench = new(new HazardLimits { UnattendedMinutes = 10 });
        bench["well-1"] = 100;
        bench.Pass(590);
        Assert.Empty(bench.Edges);
        bench.Pass(15);
        Assert.Equal([(HazardCode.UnattendedHot, true)], bench.Edges);
        bench.Bench.Watch.Attend(TestSite.Rowan, bench.Bench.Now);
        bench.Pass(35);
        Assert.Equal([(HazardCode.UnattendedHot, true), (HazardCode.UnattendedHot, false)], bench.Edges);
        bench.Pass(600);
        Assert.Equal(3, bench.Edges.Count());
    }

    [Fact]
    public void A_planned_soak_counts_as_attention_to_its_end()
    {
        HazardBench bench = new(new HazardLimits { UnattendedMinutes = 10 });
        bench["well-1"] = 100;
        bench.Pass(1);
        bench.Bench.Watch.Attend(TestSite.Rowan, bench.Bench.Now + TimeSpan.FromMinutes(20));
        bench.Pass(1790);
        Assert.Empty(bench.Edges);
        bench.Pass(30);
        Assert.Equal([(HazardCode.UnattendedHot, true)], bench.Edges);
    }

    [Fact]
    public void What_stood_before_a_restart_returns_as_if_nothing_had_happened()
    {
        HazardBench before = new();
        before["cut-out"] = 1;
        before.Pass(1);
        Alert alert = AlertLifeCycle.Next(null, before.Found[0])!.Alert;

        HazardBench after = new();
        after.Bench.Watch.Restore([alert]);
        after["cut-out"] = 1;
        after.Pass(5);
        Assert.Empty(after.Edges);
        after["cut-out"] = 0;
        after.Pass(32);
        Assert.Equal([(HazardCode.CutoutTripped, false)], after.Edges);
    }

    [Fact]
    public void A_check_that_the_lab_file_takes_away_ends_its_alert_and_says_so()
    {
        HazardBench bench = new();
        bench["cut-out"] = 1;
        bench.Pass(1);
        bench.Bench.Watch.Apply(TestSite.OneSurface());
        Assert.Contains(bench.Found, found => found.Key.Code == HazardCode.CutoutTripped && !found.Present && found.Headline.Contains("not watched any more", StringComparison.Ordinal));
    }

    [Fact]
    public void A_cooling_surface_says_when_it_is_expected_below_its_limit_with_an_interval()
    {
        HazardBench bench = new();
        bench.Pass(600, second => bench["case"] = Newton(second));
        Alert alert = AlertLifeCycle.Next(null, Assert.Single(bench.Found))!.Alert;

        string outlook = bench.Bench.Watch.WithLatest(alert).Outlook!;

        // Newton's law in closed form; the history is thinned to 10 s, so a minute either way is nothing.
        double expected = NewtonCooling.TimeTo(Newton(599), 23, 3600, 48) / 60;
        Assert.StartsWith($"Estimated time until this sensor falls below 48 degC: {Math.Floor(expected):0} min (", outlook, StringComparison.Ordinal);
        Assert.EndsWith("Treat as hot until measured.", outlook, StringComparison.Ordinal);
        Assert.Contains("reads", bench.Bench.Watch.WithLatest(alert).Headline, StringComparison.Ordinal);
        bench.Bench.Pass(20);
        Assert.Null(bench.Bench.Watch.WithLatest(alert).Outlook);
    }

    private static double Newton(int second) => NewtonCooling.TemperatureAfter(186, 23, 3600, second);
}
