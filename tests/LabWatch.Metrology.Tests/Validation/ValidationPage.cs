using System.Globalization;
using System.Text;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Validation;

/// <summary>Writes docs/validation.md from the check suites.</summary>
internal static class ValidationPage
{
    private const int LongestInput = 160;

    /// <summary>The whole page.</summary>
    public static string Write(IReadOnlyList<CheckSuite> suites)
    {
        StringBuilder page = new();
        page.Append("""
            # Validation

            Every number that the metrology computes is compared with values from outside the project: published tables and worked examples,
            and computations that others made to many digits. This page lists each comparison with its source. It is generated from the tests
            (`LABWATCH_WRITE_DOCS=1 dotnet run --project tests/LabWatch.Metrology.Tests -- -class '*.ValidationPageTests'`); the same tests fail where a
            value is outside its tolerance or this page is out of date.

            Status: **PC** published, and reproduced outside by an independent computation. **C** computed outside from the stated formula: it
            confirms the arithmetic. **PM** published, but quoted from memory and not confirmed. **F** a fact. *Used* is the share of the tolerance
            that the difference takes.


            """);
        AppendSummary(page, suites);
        foreach (CheckSuite suite in suites)
        {
            AppendSuite(page, suite);
        }

        return page.ToString().ReplaceLineEndings("\n");
    }

    private static void AppendSummary(StringBuilder page, IReadOnlyList<CheckSuite> suites)
    {
        page.Append("| subject | checks | published | met |\n|---|---|---|---|\n");
        foreach (CheckSuite suite in suites)
        {
            int published = suite.Checks.Count(check => check.Status[0] == 'P');
            int met = suite.Checks.Count(check => check.Outcome.IsMet);
            page.Append(CultureInfo.InvariantCulture, $"| {suite.Title} | {suite.Checks.Count} | {published} | {met} |\n");
        }

        page.Append('\n');
    }

    private static void AppendSuite(StringBuilder page, CheckSuite suite)
    {
        page.Append(CultureInfo.InvariantCulture, $"## {suite.Title}\n\n{suite.Introduction}\n\n");
        List<string> sources = [.. suite.Checks.Select(check => check.Source).Distinct()];
        for (int i = 0; i < sources.Count; i++)
        {
            page.Append(CultureInfo.InvariantCulture, $"- Source {i + 1}: {Escape(sources[i])}\n");
        }

        page.Append("\n| id | quantity and inputs | expected | computed | tolerance | used | status | source |\n|---|---|---|---|---|---|---|---|\n");
        foreach (Check check in suite.Checks)
        {
            CheckOutcome outcome = check.Outcome;
            page.Append(
                CultureInfo.InvariantCulture,
                $"| {check.Id} | {Escape(Cut(check.What))} | {Shortened(outcome.Expected)} | {outcome.Computed} | {outcome.Tolerance} | {outcome.Margin} | {check.Status} | {sources.IndexOf(check.Source) + 1} |\n");
        }

        page.Append('\n');
        foreach ((string rows, string reason) in suite.NotApplicable)
        {
            page.Append(CultureInfo.InvariantCulture, $"- Not checked: {rows}: {reason}.\n");
        }

        page.Append(suite.NotApplicable.Count > 0 ? "\n" : string.Empty);
    }

    private static string Cut(string text) => text.Length <= LongestInput ? text : text[..LongestInput] + "...";

    /// <summary>Expected values of 40 digits are shown with 17: a double holds no more.</summary>
    private static string Shortened(string expected) =>
        expected.Length > 20 && double.TryParse(expected, NumberStyles.Float, CultureInfo.InvariantCulture, out double value)
            ? value.ToString("G17", CultureInfo.InvariantCulture)
            : Escape(expected);

    private static string Escape(string text) =>
        text.Replace("|", "\\|", StringComparison.Ordinal).Replace("<", "&lt;", StringComparison.Ordinal).Replace("\"", string.Empty, StringComparison.Ordinal);
}
