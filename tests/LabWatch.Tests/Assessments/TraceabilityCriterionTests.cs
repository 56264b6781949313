using System.Text;
using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Simulator;

namespace LabWatch.Tests.Assessments;

/// <summary>What ISO/IEC 17025:2017, 6.4 and 6.5 ask of a chain of calibrations, each broken once.</summary>
public sealed class TraceabilityCriterionTests
{
    private static readonly TraceabilityCriterion Criterion = new(TraceabilityCriterion.DefaultSchedule);
    private static readonly Instant Start = Instant.FromUnixSeconds(1_793_664_000);
    private static readonly LabSnapshot Demo = LabFileReader.Read(Encoding.UTF8.GetBytes(DemoLab.LabFileFor(Start))).Snapshot!;

    [Fact]
    public void The_oldest_link_is_judged_by_the_part_of_its_interval_that_it_has_used()
    {
        CriterionResult result = Evaluate(Demo, "fir", 50);
        Certificate oldest = Demo.Certificates.Single(certificate => certificate.Instrument == "prt-101");
        double expected = 100 * ((Start - oldest.ValidFrom) / (oldest.DueAt!.Value - oldest.ValidFrom));
        Assert.Equal(expected, result.Value.Value, 0.01);
        Assert.Equal("%", result.Unit);
        Assert.Equal(Decision.Pass, result.Decision);
        Assert.Contains("certificate RT-26-0142 of comparator-8-14 (cert-rt-105@1, checks only)", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void An_overdue_certificate_fails()
    {
        CriterionResult result = Evaluate(Demo.With(certificate: item => item.Instrument == "prt-102" ? item with { DueAt = Start - TimeSpan.FromDays(3) } : item), "fir", 50);
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.Contains("certificate PR-26-0513 of well-middle", result.Explanation, StringComparison.Ordinal);
        Assert.Contains("It has been due for 3 days.", result.Explanation, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("fir", 50)]
    [InlineData("yew", 1000)]
    public void A_standard_without_a_certificate_breaks_the_chain(string source, double setPoint)
    {
        string instrument = source == "fir" ? "prt-101" : "rt-304";
        CriterionResult result = Evaluate(Demo.With(certificate: item => item.Instrument == instrument ? null : item), source, setPoint);
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.StartsWith("Fails: no certificate is in force for ", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void A_set_point_outside_the_range_of_a_certificate_breaks_the_chain()
    {
        CriterionResult result = Evaluate(Demo.With(certificate: item => item.Instrument == "prt-101" ? item with { MaximumCelsius = 80 } : item), "fir", 90);
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.Contains("90 degC is outside the range of certificate PR-26-0512 of well-bottom (-40 to 80 degC)", result.Explanation, StringComparison.Ordinal);
        Assert.Equal(Decision.Pass, Evaluate(Demo.With(certificate: item => item.Instrument == "prt-101" ? item with { MaximumCelsius = 80 } : item), "fir", 70).Decision);
    }

    [Fact]
    public void A_standard_that_was_calibrated_against_the_source_itself_ends_in_itself()
    {
        LabSnapshot circular = Demo.With(certificate: item => item.Instrument == "rt-304" ? item with { CalibratedAgainst = new("hollin-vale", "yew") } : item);
        Assert.Contains("the chain ends in itself", Evaluate(circular, "yew", 1000).Explanation, StringComparison.Ordinal);
        // On the contact route the comparator only checks.
        Assert.Equal(Decision.Pass, Evaluate(Demo, "hazel", 37).Decision);
    }

    [Fact]
    public void A_standard_calibrated_against_another_source_rests_on_what_that_had_then()
    {
        LabSnapshot inHouse = Demo.With(certificate: item => item.Instrument == "rt-304" ? item with { CalibratedAgainst = new("hollin-vale", "rowan"), ValidFrom = Start - TimeSpan.FromDays(20) } : item);
        Assert.Equal(Decision.Pass, Evaluate(inHouse, "yew", 1000).Decision);
        LabSnapshot overdue = inHouse.With(certificate: item => item.Instrument == "prt-201" ? item with { DueAt = Start - TimeSpan.FromDays(30) } : item);
        CriterionResult result = Evaluate(overdue, "yew", 1000);
        Assert.Equal(Decision.Fail, result.Decision);
        Assert.Contains("was calibrated against rowan while certificate PR-26-0388 of its reference was overdue", result.Explanation, StringComparison.Ordinal);
    }

    [Fact]
    public void The_resistance_at_the_triple_point_has_an_interval_of_its_own()
    {
        LabSnapshot sprt = Demo.With(
            certificate: item => item.Instrument == "prt-101" ? item with { Characteristic = new SprtCharacteristic(0.002, 2, 25, null, null) } : item,
            instrument: item => item.Id == "prt-101" ? item with { TriplePointInterval = TimeSpan.FromDays(30) } : item);
        CriterionResult late = Evaluate(sprt, "fir", 50);
        Assert.Equal(Decision.Fail, late.Decision);
        Assert.Contains("triple-point check of well-bottom", late.Explanation, StringComparison.Ordinal);
        CriterionResult kept = Evaluate(sprt.With(checks: [new("tpw-1", 1, "prt-101", Start - TimeSpan.FromDays(15), new(25.0001, 1e-5))]), "fir", 50);
        Assert.Equal(Decision.Pass, kept.Decision);
        Assert.Equal(50, kept.Value.Value, 1);
    }

    [Fact]
    public void Nothing_is_checked_against_a_set_point_that_the_source_is_not_used_at()
    {
        Assert.Equal(Decision.Pass, Evaluate(Demo, "yew", 0).Decision);
    }

    private static CriterionResult Evaluate(LabSnapshot lab, string id, double setPoint)
    {
        TimeWindow window = Criterion.Schedule.EndingAt(Start);
        FakeReadingStore store = new();
        LabWatch.Lab.Sources.ReferenceSource source = lab.Sources.Single(item => item.Key.Source == id);
        store.Add(source.Key, TestLab.SetPoints(window.Start, window.End, _ => setPoint).Append(new Reading("well-bottom", window.Start, 100)));
        return Criterion.Evaluate(new(lab, source, window, store.Read(source.Key, Criterion.Channels(source), Criterion.Schedule.SpanOf(window))))[0];
    }
}
