using System.Globalization;
using System.Text;

namespace LabWatch.SystemTests.Reliability;

/// <summary>
/// Collects what each fault test found: one row a trial, written to the folder that <c>tests/run</c> names; <c>tests/run --long</c> makes
/// <c>docs/reliability.md</c> of the rows. Does nothing where no folder is named. Call it before the assertions, so that a failure shows in the report.
/// </summary>
internal static class ReliabilityReport
{
    private const string FolderVariable = "LABWATCH_RELIABILITY_FOLDER";

    /// <summary>Records one trial; a trial of the same part and fault replaces the one before.</summary>
    /// <param name="part">What the fault was done to, as in "store of readings" or "InfluxDB".</param>
    /// <param name="fault">What was done, as in "killed at random moments under load".</param>
    /// <param name="dose">How often, how long or how much, as in "100 kills".</param>
    /// <param name="outcome">What was seen, in plain words.</param>
    /// <param name="acknowledged">Readings that had been acknowledged; null where the trial does not count them.</param>
    /// <param name="lost">Acknowledged readings that were missing afterwards.</param>
    /// <param name="doubled">Readings that were there more than once.</param>
    public static void Record(string part, string fault, string dose, string outcome, long? acknowledged = null, long? lost = null, long? doubled = null)
    {
        if (Environment.GetEnvironmentVariable(FolderVariable) is not { Length: > 0 } folder)
        {
            return;
        }

        Directory.CreateDirectory(folder);
        string row = $"| {Cell(part)} | {Cell(fault)} | {Cell(dose)} | {Number(acknowledged)} | {Number(lost)} | {Number(doubled)} | {Cell(outcome)} |\n";
        File.WriteAllText(Path.Combine(folder, FileName(part, fault)), row);
    }

    private static string Cell(string text) => text.Replace("|", "\\|", StringComparison.Ordinal).ReplaceLineEndings(" ");

    private static string Number(long? number) => number?.ToString("N0", CultureInfo.InvariantCulture) ?? string.Empty;

    private static string FileName(string part, string fault)
    {
        StringBuilder name = new();
        foreach (char one in $"{part}--{fault}".ToLowerInvariant())
        {
            name.Append(char.IsAsciiLetterOrDigit(one) ? one : '-');
        }

        return name.Append(".row").ToString();
    }
}
