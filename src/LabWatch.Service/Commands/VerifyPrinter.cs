using System.Text.Json;
using LabWatch.Evidence.Verification;
using LabWatch.Lab.Findings;
using LabWatch.Records.Audit;
using LabWatch.Records.Audit.Verification;

namespace LabWatch.Service.Commands;

/// <summary>Writes the report of a verification for people, or for programs.</summary>
internal static class VerifyPrinter
{
    private const int Shown = 50;

    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web) { WriteIndented = true };

    /// <summary>Findings first, then what was examined, the heads to write down, and what cannot be told.</summary>
    public static void Write(TextWriter output, VerifyReport report, string data)
    {
        foreach (TrailFinding finding in report.Findings.Kept.Take(Shown))
        {
            output.WriteLine($"{Finding.Quote(finding.Where)}");
            output.WriteLine($"    {finding.Code}: {Finding.Quote(finding.Message)}");
            output.WriteLine($"    {Finding.Quote(finding.Meaning)}");
        }

        if (report.Findings.Total > Shown)
        {
            output.WriteLine(FormattableString.Invariant($"... and {report.Findings.Total - Shown} more: {Counts(report)}. --json FILE lists them."));
        }

        output.WriteLine(report.IsClean
            ? $"No findings: {data} is as it was recorded."
            : FormattableString.Invariant($"{report.Findings.Total} finding(s) in {data}: {Counts(report)}."));
        output.WriteLine("Examined: " + string.Join(", ", report.Examined.Select(table => FormattableString.Invariant($"{table.Key} {table.Value:N0}"))) + FormattableString.Invariant($"; {report.Readings:N0} sealed readings."));
        foreach (string note in report.Notes)
        {
            output.WriteLine("Note: " + note);
        }

        foreach ((string site, AuditHead head) in report.Heads)
        {
            output.WriteLine(FormattableString.Invariant($"Head of {site}: {head.Sequence}:{head.Digest}"));
        }

        output.WriteLine("Write the head down where the administrator of this machine cannot change it, and give it with --head next time: a chain that was cut at its end, or written anew from some entry on, agrees with itself and shows only against such a note.");
    }

    /// <summary>The report as one JSON object.</summary>
    public static void WriteJson(Stream output, VerifyReport report, string data, DateTimeOffset at) =>
        JsonSerializer.Serialize(
            output,
            new
            {
                data,
                at,
                clean = report.IsClean,
                total = report.Findings.Total,
                counts = report.Findings.Counts,
                findings = report.Findings.Kept,
                examined = report.Examined,
                report.Readings,
                report.Heads,
                report.Notes,
            },
            Json);

    private static string Counts(VerifyReport report) =>
        string.Join(", ", report.Findings.Counts.Select(code => FormattableString.Invariant($"{code.Key} {code.Value}")));
}
