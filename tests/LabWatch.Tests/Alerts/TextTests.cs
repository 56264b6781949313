using System.Globalization;
using System.Reflection;
using System.Text.RegularExpressions;
using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.Messages;
using LabWatch.Lab.Sources;

namespace LabWatch.Tests.Alerts;

/// <summary>The words that a person acts on.</summary>
public sealed partial class TextTests
{
    public static TheoryData<string> Names =>
        [.. typeof(AlertTexts).GetProperties(BindingFlags.Public | BindingFlags.Static).Select(property => property.Name)];

    [Theory]
    [MemberData(nameof(Names))]
    public void Every_text_is_there_plain_and_never_promises_safety(string name)
    {
        string text = (string)typeof(AlertTexts).GetProperty(name)!.GetValue(null)!;
        Assert.NotEmpty(text);
        Assert.DoesNotMatch(Promise(), text);
        Assert.All(text, letter => Assert.True(char.IsAscii(letter)));
    }

    [Fact]
    public void The_caution_names_what_remains_in_force()
    {
        foreach (string part in (string[])["no protective device", "over-temperature protection", "guards", "gas alarms", "ventilation", "eye protection", "local rules"])
        {
            Assert.Contains(part, AlertTexts.Caution, StringComparison.Ordinal);
        }

        Assert.DoesNotContain('\n', AlertTexts.Caution);
    }

    [Fact]
    public void Headlines_keep_to_160_characters_whole_even_with_long_names()
    {
        ReferenceSource source = TestSite.Source(TestSite.Rowan) with { Name = new string('S', 200) };
        Channel channel = TestSite.Surface(TestSite.Rowan) with { Name = new string('C', 200) };
        HazardChannel long_ = new(source, channel, SurfaceLimit.For(null), 0, new HazardChannelState(0, null, new RecentReadings(TimeSpan.FromSeconds(60), TimeSpan.FromSeconds(1))))
        {
            Thermometer = SurfaceThermometer.For(channel, null),
        };
        HazardTexts texts = new(new SiteTime(TestSite.Lab().Site));
        foreach (LabWatch.Alerts.LifeCycle.AlertCondition found in (LabWatch.Alerts.LifeCycle.AlertCondition[])[
            texts.HotSurface(long_, long_.Limit!.Value, 1234.5, 1234.5, TestSite.Start),
            texts.HotSurfaceReturned(long_, long_.Limit.Value, 1234.5, 1234.5, TestSite.Start),
            texts.Silent(long_, TimeSpan.FromDays(100), TestSite.Start),
            texts.OnlyOld(long_, TimeSpan.FromSeconds(60), TestSite.Start),
            texts.SilenceEnded(long_, TestSite.Start)])
        {
            Assert.InRange(found.Headline.Length, 1, 160);
            Assert.EndsWith(".", found.Headline, StringComparison.Ordinal);
            Assert.False(found.Headline.EndsWith("...", StringComparison.Ordinal), found.Headline);
            Assert.Contains(AlertTexts.Caution, found.Detail, StringComparison.Ordinal);
        }
    }

    public static TheoryData<string> Causes => [.. Enum.GetNames<HazardCause>()];

    [Theory]
    [MemberData(nameof(Causes))]
    public void Every_hazard_has_all_its_texts_whole_within_160_characters(string name)
    {
        HazardCause cause = Enum.Parse<HazardCause>(name);
        foreach (string part in (string[])["Headline", "What", "Do", "DoNot", "Returned"])
        {
            string text = AlertTexts.Of(cause, part);
            Assert.DoesNotMatch(Promise(), text);
            Assert.All(text, letter => Assert.True(char.IsAscii(letter)));
            Assert.EndsWith(part == "Headline" && text[^1] == '?' ? "?" : ".", text, StringComparison.Ordinal);
            Assert.InRange(Phrase.Fill(text, new string('S', 24), new string('C', 24), "1234.5", "1234.5", "1234.5").Length, 1, part is "Headline" or "Returned" ? 160 : 1000);
        }
    }

    [Theory]
    [InlineData(0.4, "400 ms")]
    [InlineData(119, "119 s")]
    [InlineData(120, "2 min")]
    [InlineData(7199, "119 min")]
    [InlineData(7200, "2 h")]
    [InlineData(172_800, "2 days")]
    public void Durations_are_written_in_the_unit_that_suits_them(double seconds, string text) =>
        Assert.Equal(text, Phrase.Duration(TimeSpan.FromSeconds(seconds)));

    [Fact]
    public void Numbers_do_not_depend_on_the_culture()
    {
        CultureInfo before = CultureInfo.CurrentCulture;
        CultureInfo comma = (CultureInfo)CultureInfo.InvariantCulture.Clone();
        comma.NumberFormat.NumberDecimalSeparator = ",";
        CultureInfo.CurrentCulture = comma;
        Assert.Equal("48.3", Phrase.Celsius(48.25 + 0.01));
        CultureInfo.CurrentCulture = before;
    }

    [GeneratedRegex(@"\bsafe\b|\bsafely\b|\bharmless\b|\bno danger\b|\bmay touch\b|\bcan touch\b", RegexOptions.IgnoreCase)]
    private static partial Regex Promise();
}
