using System.CommandLine;
using LabWatch.Lab.Findings;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary>What commands that take a lab file share.</summary>
internal static class LabFileOptions
{
    private const int LongestReason = 1_000;

    public static Option<bool> Accept { get; } = new("--accept") { Description = "Let the lab file revert edits and withdraw what it does not have." };

    public static Option<string> Reason { get; } = MakeReason();

    /// <summary>The order of a file; the finding where it cannot be read.</summary>
    public static (LabOrder? Order, Finding? Finding) Read(string path, ParseResult parsed)
    {
        (ReadOnlyMemory<byte>? text, string? problem) = LabSnapshotSource.ReadFile(path);
        return text is { } document
            ? (new LabOrder(document, Path.GetFileName(path), LabOrder.WhoRunsThis) { Accept = parsed.GetValue(Accept), Reason = parsed.GetValue(Reason) }, null)
            : (null, LabSnapshotSource.Unreadable(path, problem));
    }

    private static Option<string> MakeReason()
    {
        Option<string> reason = new("--reason") { Description = "Why the lab file changed; the records keep it with each change.", HelpName = "TEXT" };
        reason.Validators.Add(result =>
        {
            string? text = result.GetValueOrDefault<string>();
            if (text is not null && (string.IsNullOrWhiteSpace(text) || text.Length > LongestReason || text.Any(char.IsControl)))
            {
                result.AddError($"--reason: give 1 to {LongestReason} characters without line breaks.");
            }
        });
        return reason;
    }
}
