using System.Text.Json;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Commands;

/// <summary>Writes findings for people, or for programs.</summary>
internal static class FindingPrinter
{
    private static readonly JsonSerializerOptions Json = new(JsonSerializerDefaults.Web) { WriteIndented = true };

    /// <summary>One paragraph a finding: where, what, the value met, the cure.</summary>
    public static void Write(TextWriter writer, IReadOnlyList<Finding> findings)
    {
        foreach (Finding finding in findings)
        {
            writer.WriteLine($"{(finding.Where.Length > 0 ? finding.Where : "(whole file)")}");
            writer.WriteLine($"    {finding.Message}");
            if (finding.Value is { } value)
            {
                writer.WriteLine($"    value: {value}");
            }

            writer.WriteLine($"    cure:  {finding.Cure}");
        }
    }

    /// <summary>The findings as a JSON array.</summary>
    public static void WriteJson(TextWriter writer, IReadOnlyList<Finding> findings) =>
        writer.WriteLine(JsonSerializer.Serialize(findings, Json));
}
