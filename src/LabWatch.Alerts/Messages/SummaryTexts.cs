using System.Globalization;
using LabWatch.Lab.Alerts;

namespace LabWatch.Alerts.Messages;

/// <summary>Puts many alerts into one message: how many, of what, at how many sources, and the gravest first.</summary>
internal static class SummaryTexts
{
    private const int Listed = 20;

    /// <summary>The short form.</summary>
    public static string Headline(IReadOnlyList<Alert> alerts) => Phrase.Headline(
        AlertTexts.SummaryHeadline, alerts.Count, Phrase.Cut(Codes(alerts), 90), alerts.Select(alert => alert.Source).Distinct().Count());

    /// <summary>The long form, with the caution where a hazard is among them.</summary>
    public static string Detail(IReadOnlyList<Alert> alerts)
    {
        IEnumerable<string> lines = alerts.Take(Listed).Select(alert => "- " + alert.Headline);
        string more = alerts.Count > Listed ? Phrase.Fill(AlertTexts.SummaryMore, alerts.Count - Listed) : string.Empty;
        string caution = alerts.Any(alert => alert.IsHazard) ? "\n" + AlertTexts.Caution : string.Empty;
        return Phrase.Fill(AlertTexts.SummaryDetail, alerts.Count, Codes(alerts), string.Join('\n', [.. lines, .. more.Length > 0 ? [more] : Array.Empty<string>()])) + caution;
    }

    private static string Codes(IReadOnlyList<Alert> alerts) => string.Join(", ", alerts
        .GroupBy(alert => alert.Code, StringComparer.Ordinal)
        .OrderByDescending(group => HazardCode.IsHazard(group.Key))
        .ThenByDescending(group => group.Count())
        .Select(group => string.Create(CultureInfo.InvariantCulture, $"{group.Count()} {group.Key}")));
}
