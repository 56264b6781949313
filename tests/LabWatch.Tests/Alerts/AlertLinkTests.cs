using LabWatch.Alerts;
using LabWatch.Alerts.Links;

namespace LabWatch.Tests.Alerts;

/// <summary>Links in messages lead to their alert for a while and to nothing else.</summary>
public sealed class AlertLinkTests : IDisposable
{
    private static readonly Guid Alert = Guid.Parse("01938400-0000-7000-8000-000000000001");
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-links-").FullName;

    [Fact]
    public void A_link_leads_to_its_alert_until_its_end_and_across_a_restart()
    {
        string token = TokenOf(Links());
        Assert.Equal(Alert, Links().Read(token, TestSite.Start + TimeSpan.FromHours(24) - TimeSpan.FromSeconds(1)));
        Assert.Null(Links().Read(token, TestSite.Start + TimeSpan.FromHours(24)));
    }

    [Theory]
    [InlineData("")]
    [InlineData("AAAA")]
    [InlineData("not base64url!")]
    public void What_is_no_link_leads_nowhere(string token) => Assert.Null(Links().Read(token, TestSite.Start));

    [Fact]
    public void A_link_with_any_letter_changed_leads_nowhere()
    {
        string token = TokenOf(Links());
        for (int i = 0; i < token.Length - 1; i++)
        {
            string changed = token[..i] + (token[i] == 'A' ? 'B' : 'A') + token[(i + 1)..];
            Assert.Null(Links().Read(changed, TestSite.Start));
        }
    }

    [Fact]
    public void Without_a_public_address_there_is_no_link() => Assert.Null(new AlertLinks(new AlertsOptions { DataDirectory = _folder }).For(Alert, TestSite.Start));

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private AlertLinks Links() => new(new AlertsOptions { DataDirectory = _folder, PublicAddress = "https://labwatch.hollin-vale.example/" });

    private static string TokenOf(AlertLinks links)
    {
        string link = links.For(Alert, TestSite.Start)!;
        Assert.StartsWith("https://labwatch.hollin-vale.example/?acknowledge=", link, StringComparison.Ordinal);
        return link[(link.IndexOf('=', StringComparison.Ordinal) + 1)..];
    }
}
