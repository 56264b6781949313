using LabWatch.Alerts.LifeCycle;
using LabWatch.Alerts.Messages;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Alerts;

/// <summary>What a person is told of an assessment out of tolerance.</summary>
public sealed class ToleranceTextTests
{
    private static readonly ToleranceTexts Texts = new(new SiteTime(TestSite.Lab().Site));

    public static TheoryData<string> Criteria => [.. CriterionCode.All];

    [Theory]
    [InlineData(CriterionCode.Stability, "", 12.3, 10, "mK", "Rowan furnace: stability 12.3 mK, limit 10 mK (fail).")]
    [InlineData(CriterionCode.AxialUniformity, "", 0.31, 0.2, "K", "Rowan furnace: difference between the wells 0.31 K, limit 0.2 K (fail).")]
    [InlineData(CriterionCode.EffectiveEmissivity, "lw", 0.00213, 0.001, "/", "Rowan furnace: effective emissivity (8 to 14 um) off its baseline by 0.00213, limit 0.001 (fail).")]
    [InlineData(CriterionCode.EffectiveEmissivity, "comparator", 0.00213, 0.001, "/", "Rowan furnace: effective emissivity (Comparator, 8 to 14 um) off its baseline by 0.00213, limit 0.001 (fail).")]
    [InlineData(CriterionCode.DataHealth, "", 38.6, 5, "%", "Rowan furnace: readings missing or bad 38.6 %, limit 5 % (fail).")]
    public void The_headline_says_what_was_measured_by_names_that_people_know(string criterion, string scope, double value, double limit, string unit, string expected) =>
        Assert.Equal(expected, Texts.Describe(Fail(criterion, scope, value, limit, unit), Source(), true, TestSite.Start).Headline);

    [Theory]
    [MemberData(nameof(Criteria))]
    public void Headlines_keep_to_160_characters_whole_for_every_criterion_even_with_long_names(string criterion)
    {
        ReferenceSource source = Source() with { Name = new string('S', 200), Bands = [new WorkingBand("lw", new string('B', 200), 8, 14)] };
        Assessment fail = Fail(criterion, "lw", -1234.567, 1234.567, "mK") with { Decision = Decision.ConditionalFail };
        AlertCondition raised = Texts.Describe(fail, source, true, TestSite.Start);
        Alert alert = new(
            Guid.CreateVersion7(), fail.Source, criterion, "lw", AlertPriority.Low, AlertState.RaisedUnacknowledged, TestSite.Start, raised.Headline, raised.Detail, 1, 1, "mK");
        foreach (AlertCondition found in (AlertCondition[])[
            raised,
            Texts.Describe(fail with { Limit = null }, source, true, TestSite.Start),
            Texts.Describe(fail with { Decision = Decision.Pass }, source, false, TestSite.Start),
            Texts.NotJudged(alert, source, AlertTexts.NotJudgedNoSource, TestSite.Start),
            Texts.NotJudged(alert, null, AlertTexts.NotJudgedNoLimit, TestSite.Start)])
        {
            Assert.InRange(found.Headline.Length, 1, 160);
            Assert.EndsWith(".", found.Headline, StringComparison.Ordinal);
            Assert.False(found.Headline.EndsWith("...", StringComparison.Ordinal), found.Headline);
            Assert.DoesNotContain("{", found.Headline + found.Detail, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void The_detail_holds_the_reason_what_to_do_and_a_caution_where_the_source_can_be_hot()
    {
        Assessment fail = Fail(CriterionCode.EffectiveEmissivity, "lw", 0.002, 0.001, "/");
        string hot = Texts.Describe(fail, Source(), true, TestSite.Start).Detail;
        Assert.StartsWith("fail: It moved by 0.002. Window 2026-12-01 07:30:00 +00:00 to 2026-12-01 08:00:00 +00:00, revision 1.", hot, StringComparison.Ordinal);
        Assert.Contains("Do: Do not calibrate in this band until the cause is found:", hot, StringComparison.Ordinal);
        Assert.EndsWith("treat as hot until measured. " + AlertTexts.Caution, hot, StringComparison.Ordinal);
        Assert.DoesNotContain(AlertTexts.Caution, Texts.Describe(fail, Source() with { MinimumCelsius = 34, MaximumCelsius = 42 }, true, TestSite.Start).Detail, StringComparison.Ordinal);
        Assert.Equal(4, CriteriaThatAreJudged.Select(CriterionTexts.Do).Distinct().Count());
    }

    [Fact]
    public void The_end_of_what_is_not_judged_any_more_says_why_and_claims_nothing()
    {
        Alert alert = new(
            Guid.CreateVersion7(), TestSite.Rowan, CriterionCode.DataHealth, "", AlertPriority.Low, AlertState.RaisedUnacknowledged, TestSite.Start, "", "", 38.6, 5, "%");
        AlertCondition found = Texts.NotJudged(alert, Source(), AlertTexts.NotJudgedNoLimit, TestSite.Start);
        Assert.Equal("Rowan furnace: data health is not judged any more (no acceptance limit for it is in force).", found.Headline);
        Assert.Contains("nothing has shown since that it is within", found.Detail, StringComparison.Ordinal);
        Assert.False(found.Present);
    }

    private static string[] CriteriaThatAreJudged => [CriterionCode.Stability, CriterionCode.AxialUniformity, CriterionCode.EffectiveEmissivity, CriterionCode.DataHealth];

    private static ReferenceSource Source()
    {
        Channel comparator = new(new(TestSite.Rowan, "comparator"), "Comparator, 8 to 14 um", ChannelQuantity.ComparatorTemperature, "Cel", TimeSpan.FromSeconds(1)) { Band = "lw" };
        return TestSite.Source(TestSite.Rowan, TestSite.Well(TestSite.Rowan), comparator) with { Bands = [new WorkingBand("lw", "8 to 14 um", 8, 14)] };
    }

    private static Assessment Fail(string criterion, string scope, double value, double limit, string unit) => new(
        TestSite.Rowan, criterion, scope, new TimeWindow(TestSite.Start - TimeSpan.FromMinutes(30), TestSite.Start), 1, new Estimate(value, 0), unit, limit, 2,
        Decision.Fail, 0, [], "It moved by 0.002.", new Provenance("", [], [], null, "0"), TestSite.Start, null);
}
