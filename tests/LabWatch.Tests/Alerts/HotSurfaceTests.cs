using LabWatch.Alerts;
using LabWatch.Alerts.Messages;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Tests.Alerts;

/// <summary>
/// A touchable surface at or above its limit. Limits: ISO 13732-1:2006, values from memory (unconfirmed), as in the burn threshold's own tests;
/// unknown material or contact: 48 degC up to 10 min, 43 degC beyond.
/// </summary>
public sealed class HotSurfaceTests
{
    private static readonly (string, bool) Raised = (HazardCode.HotSurface, true);
    private static readonly (string, bool) Returned = (HazardCode.HotSurface, false);

    [Theory]
    [InlineData(47.9, false)]
    [InlineData(48.0, true)]
    [InlineData(186.0, true)]
    public void The_first_valid_reading_at_or_above_the_limit_raises(double celsius, bool raises)
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(celsius);
        Assert.Equal(raises ? [Raised] : [], bench.Edges);
    }

    [Theory]
    [InlineData(SurfaceMaterial.Unknown, null, null, 48)]
    [InlineData(SurfaceMaterial.Unknown, 601.0, null, 43)]
    [InlineData(SurfaceMaterial.UncoatedMetal, 1.0, null, 65)]
    [InlineData(SurfaceMaterial.CeramicGlassStone, 60.0, null, 56)]
    [InlineData(SurfaceMaterial.Wood, 60.0, 45.0, 45)]
    [InlineData(SurfaceMaterial.UncoatedMetal, 600.0, 60.0, 48)]
    public void The_limit_is_the_lower_of_burn_threshold_and_the_laboratorys_own(
        SurfaceMaterial material, double? contactSeconds, double? own, double limit)
    {
        TimeSpan? contact = contactSeconds is { } seconds ? TimeSpan.FromSeconds(seconds) : null;
        WatchBench bench = new(TestSite.OneSurface(new SurfaceContact(material, contact, own)));
        bench.Send(limit - 0.01);
        Assert.Empty(bench.Edges);
        bench.Pass(1, limit);
        Assert.Equal(limit, Assert.Single(bench.Conditions.Found).Limit);
    }

    [Theory]
    [InlineData(ChannelQuantity.OuterSurface, true)]
    [InlineData(ChannelQuantity.ApertureLip, false)]
    public void Without_a_stated_contact_an_outer_surface_is_watched_as_unknown_and_a_lip_is_not(ChannelQuantity quantity, bool isWatched)
    {
        Channel surface = new(new ChannelKey(TestSite.Rowan, "surface"), "Surface", quantity, "Cel", TimeSpan.FromSeconds(1));
        WatchBench bench = new(TestSite.Lab(TestSite.Source(TestSite.Rowan, surface)));
        bench.Send(48, channel: "surface");
        Assert.Equal(isWatched, bench.Edges.Any());
    }

    [Fact]
    public void It_returns_only_after_the_off_delay_below_the_dead_band()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(60);
        bench.Pass(120, 46.5);
        Assert.Equal([Raised], bench.Edges);
        bench.Pass(30, 45.9);
        Assert.Equal([Raised], bench.Edges);
        bench.Pass(1, 45.9);
        Assert.Equal([Raised, Returned], bench.Edges);
    }

    [Fact]
    public void A_value_swinging_around_the_limit_does_not_chatter()
    {
        WatchBench bench = new(TestSite.OneSurface());
        for (int i = 0; i < 300; i++)
        {
            bench.Pass(1, i % 2 == 0 ? 49 : 45);
        }

        Assert.Equal([Raised], bench.Edges);
    }

    [Fact]
    public void An_on_delay_is_kept_and_passes_even_if_the_sensor_falls_silent()
    {
        AlertsOptions options = new() { DataDirectory = "unused", HotSurfaceOnDelay = TimeSpan.FromSeconds(5) };
        WatchBench bench = new(TestSite.OneSurface(), options);
        bench.Send(60);
        bench.Pass(3, 40);
        bench.Pass(10, 40);
        Assert.Empty(bench.Edges);
        bench.Send(60);
        bench.Pass(4);
        Assert.Empty(bench.Edges);
        bench.Pass(1);
        Assert.Equal([Raised], bench.Edges);
    }

    [Fact]
    public void A_silent_sensor_never_lowers_or_ends_a_hot_surface()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(60);
        bench.Pass(1, 20);
        bench.Pass(3600);
        Assert.DoesNotContain(Returned, bench.Edges);
    }

    [Theory]
    [InlineData(double.NaN, ReadingQuality.NoValue)]
    [InlineData(20, ReadingQuality.OutsideSensorRange)]
    [InlineData(-60, ReadingQuality.None)]
    [InlineData(1372, ReadingQuality.None)]
    public void An_invalid_reading_neither_raises_nor_lowers(double value, ReadingQuality quality)
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(value, quality: quality);
        Assert.Empty(bench.Edges);
        bench.Send(60);
        for (int i = 0; i < 100; i++)
        {
            bench.Pass(1);
            bench.Send(value, quality: quality);
        }

        Assert.DoesNotContain(Returned, bench.Edges);
    }

    [Fact]
    public void Readings_older_than_a_minute_raise_nothing()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(186, age: TimeSpan.FromSeconds(60.001));
        Assert.Empty(bench.Edges);
        bench.Send(186, age: TimeSpan.FromSeconds(60));
        Assert.Equal([Raised], bench.Edges);
    }

    [Fact]
    public void A_redelivered_pack_changes_nothing()
    {
        WatchBench bench = new(TestSite.OneSurface());
        ReadingPack hot = new(TestSite.Rowan, bench.Now, [new Reading("case", bench.Now, 60)]);
        bench.Watch.OnPack(hot);
        bench.Pass(32, 30);
        Assert.Equal([Raised, Returned], bench.Edges);
        bench.Watch.OnPack(hot);
        Assert.Equal([Raised, Returned], bench.Edges);
    }

    [Fact]
    public void A_late_but_fresh_hot_reading_raises_and_a_late_cool_one_does_not_lower()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(30);
        bench.Send(60, age: TimeSpan.FromSeconds(20));
        Assert.Equal([Raised], bench.Edges);
        bench.Pass(20, 60);
        for (int i = 0; i < 50; i++)
        {
            bench.Clock.Advance(TimeSpan.FromSeconds(1));
            bench.Send(20, age: TimeSpan.FromSeconds(59.5));
        }

        Assert.Equal([Raised], bench.Edges);
    }

    [Fact]
    public void A_device_clock_that_ran_ahead_does_not_hide_what_follows()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(30, age: TimeSpan.FromHours(-5));
        bench.Pass(1, 60);
        Assert.Equal([Raised], bench.Edges);
        bench.Pass(31, 30);
        Assert.Equal([Raised, Returned], bench.Edges);
    }

    [Fact]
    public void Any_sensor_raises_and_no_other_sensor_outvotes_it()
    {
        WatchBench bench = new(TestSite.Lab(TestSite.Source(
            TestSite.Rowan, TestSite.Surface(TestSite.Rowan, "case"), TestSite.Surface(TestSite.Rowan, "case-2"), TestSite.Surface(TestSite.Rowan, "case-3"))));
        bench.Watch.OnPack(new ReadingPack(
            TestSite.Rowan, bench.Now, [new Reading("case", bench.Now, 25), new Reading("case-2", bench.Now, 90), new Reading("case-3", bench.Now, 25)]));
        Assert.Equal("case-2", Assert.Single(bench.Conditions.Found).Key.Subject);
    }

    [Fact]
    public void A_resistance_is_read_through_the_certificate_in_force_even_outside_its_range()
    {
        WatchBench bench = new(Resistance(certificate: true));
        Assert.DoesNotContain(bench.Watch.Findings, finding => finding.Code == "surface-not-evaluable");

        // IEC 60751:2022, table 1: a Pt100 has 109.735 ohm at 25 degC and 157.325 ohm at 150 degC; the certificate ends at 100 degC.
        bench.Send(109.735);
        Assert.Empty(bench.Edges);
        bench.Pass(1, 157.325);
        Assert.Equal(150, Assert.Single(bench.Conditions.Found).Value!.Value, 1e-2);
        Assert.Contains("outside the range of certificate", bench.Conditions.Found[0].Detail, StringComparison.Ordinal);
    }

    [Fact]
    public void A_resistance_without_a_certificate_is_a_finding_and_raises_nothing()
    {
        WatchBench bench = new(Resistance(certificate: false));
        Assert.Equal("surface-not-evaluable", Assert.Single(bench.Watch.Findings).Code);
        bench.Send(157.325);
        Assert.Empty(bench.Edges);
    }

    [Fact]
    public void A_harmless_reading_allocates_nothing()
    {
        WatchBench bench = new(Resistance(certificate: true));
        ReadingPack[] packs = [.. Enumerable.Range(0, 2000).Select(i =>
            new ReadingPack(TestSite.Rowan, TestSite.Start + TimeSpan.FromMilliseconds(i), [new Reading("case", TestSite.Start + TimeSpan.FromMilliseconds(i), 109)]))];
        foreach (ReadingPack pack in packs[..1000])
        {
            bench.Watch.OnPack(pack);
        }

        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 1000; i < packs.Length; i++)
        {
            bench.Watch.OnPack(packs[i]);
        }

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
        Assert.Empty(bench.Edges);
    }

    [Fact]
    public void A_hostile_time_or_channel_does_not_throw()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Watch.OnPack(new ReadingPack(TestSite.Rowan, bench.Now, [
            new Reading("case", new Instant(long.MinValue), 60),
            new Reading("none", bench.Now, 60),
            new Reading("case", new Instant(long.MaxValue), 60)]));
        bench.Watch.OnPack(new ReadingPack(TestSite.Yew, bench.Now, [new Reading("case", bench.Now, 60)]));
        Assert.Equal([Raised], bench.Edges);
    }

    [Fact]
    public void A_channel_taken_out_of_the_lab_file_ends_its_alert_and_says_so()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(60);
        bench.Watch.Apply(TestSite.Lab(TestSite.Source(TestSite.Rowan, TestSite.Well(TestSite.Rowan))));
        Assert.Equal([Raised, Returned], bench.Edges);
        Assert.Contains("not watched any more", bench.Conditions.Found[1].Headline, StringComparison.Ordinal);
    }

    [Fact]
    public void A_changed_lab_file_keeps_what_is_known_of_a_channel()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(60);
        bench.Watch.Apply(TestSite.OneSurface(new SurfaceContact(SurfaceMaterial.UncoatedMetal, null, 44)));
        bench.Pass(40, 43);
        Assert.Equal([Raised], bench.Edges);
        bench.Pass(40, 41);
        Assert.Equal([Raised, Returned], bench.Edges);
    }

    [Fact]
    public void A_thermocouple_on_a_surface_takes_its_reference_junctions_from_their_channel()
    {
        // IEC 60584-1:2013, type K: 2.023 mV at 50 degC and 1.000 mV at 25 degC against 0 degC.
        WatchBench bench = new(Thermocouple());
        bench.Watch.OnPack(new ReadingPack(TestSite.Rowan, bench.Now, [new Reading("case", bench.Now, 2.03 - 1.000), new Reading("junction", bench.Now, 25)]));
        Assert.Equal([Raised], bench.Edges);
        Assert.InRange(bench.Conditions.Found[0].Value!.Value, 50, 50.3);
    }

    [Fact]
    public void A_thermocouple_whose_reference_junctions_are_silent_counts_as_silent_itself()
    {
        WatchBench bench = new(Thermocouple());
        bench.Pass(400, 1.03);
        Assert.Equal([(HazardCode.HazardSilent, true)], bench.Edges);
    }

    [Fact]
    public void The_message_says_what_where_value_limit_since_when_and_the_caution()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(186.04);
        LabWatch.Alerts.LifeCycle.AlertCondition found = Assert.Single(bench.Conditions.Found);
        Assert.Equal("Rowan furnace, Outer case, front: this surface sensor reads 186 degC, limit 48 degC. Treat as hot.", found.Headline);
        Assert.Contains("2026-12-01 08:00:00 +00:00", found.Detail, StringComparison.Ordinal);
        Assert.Contains("hollin-vale.rowan", found.Detail, StringComparison.Ordinal);
        Assert.EndsWith(AlertTexts.Caution, found.Detail, StringComparison.Ordinal);
    }

    private static LabWatch.Lab.LabSnapshot Thermocouple()
    {
        Channel channel = TestSite.Surface(TestSite.Rowan, unit: "mV") with { ReferenceJunction = new("junction", new(0, 0)) };
        Channel junction = new(new ChannelKey(TestSite.Rowan, "junction"), "Terminal block", ChannelQuantity.ReferenceJunction, "Cel", TimeSpan.FromSeconds(1));
        Certificate paper = new(
            "case-cert", 1, "case-sensor", "HV-1", "Hollin Vale", TestSite.Start - TimeSpan.FromDays(30), null, 0, 300,
            new ThermocoupleCharacteristic(0.5, 2, ThermocoupleType.K, [], null));
        Installation stay = new("case-sensor", channel.Key, TestSite.Start - TimeSpan.FromDays(20), null);
        return TestSite.Lab([], [stay], [paper], TestSite.Source(TestSite.Rowan, channel, junction));
    }

    private static LabWatch.Lab.LabSnapshot Resistance(bool certificate)
    {
        Channel channel = TestSite.Surface(TestSite.Rowan, unit: "Ohm");
        CallendarVanDusen nominal = CallendarVanDusen.Nominal(100);
        Certificate paper = new(
            "case-cert", 2, "case-sensor", "HV-1", "Hollin Vale", TestSite.Start - TimeSpan.FromDays(30), null, 0, 100,
            new CallendarVanDusenCharacteristic(0.5, 2, nominal.R0Ohm, nominal.A, nominal.B, nominal.C));
        Installation stay = new("case-sensor", channel.Key, TestSite.Start - TimeSpan.FromDays(20), null);
        return TestSite.Lab([], [stay], certificate ? [paper] : [], TestSite.Source(TestSite.Rowan, channel));
    }
}
