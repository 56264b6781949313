using System.CommandLine;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;
using LabWatch.Service.Web;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch check-config</c>: lists everything that is wrong with a lab file and with the options, without starting anything.</summary>
internal static class CheckConfigCommand
{
    public static Command Create()
    {
        Option<FileInfo> lab = new("--lab") { Description = "Lab file to check.", HelpName = "FILE" };
        Option<bool> json = new("--json") { Description = "Write the findings as a JSON array." };
        Option<bool> schema = new("--schema") { Description = "Write the JSON Schema of the lab file and do nothing else." };
        Command command = new("check-config", "List all findings about a lab file and the options at once: where, value, cure.") { lab, CommonOptions.Config, CommonOptions.Urls, json, schema };
        command.SetAction(parsed =>
        {
            TextWriter output = parsed.InvocationConfiguration.Output;
            if (parsed.GetValue(schema))
            {
                output.Write(LabFileReader.Schema);
                return ExitCode.Success;
            }

            List<Finding> findings = [.. CheckOptions(parsed.GetValue(CommonOptions.Config)?.FullName, parsed.GetValue(CommonOptions.Urls)!)];
            FileInfo? file = parsed.GetValue(lab);
            findings.AddRange(file is null ? [] : CheckLabFile(file.FullName));
            return Report(output, findings, parsed.GetValue(json), file is not null);
        });
        return command;
    }

    private static IReadOnlyList<Finding> CheckOptions(string? file, string urls)
    {
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(file);
        if (configuration is null)
        {
            return unreadable;
        }

        (ServiceSettings settings, IReadOnlyList<Finding> findings) = SettingsReader.Read(configuration, DataDirectory.DefaultPath("labwatch"), "check");
        return [.. findings, .. WebAddresses.Check(WebAddresses.Parse(urls), settings.Web)];
    }

    private static IReadOnlyList<Finding> CheckLabFile(string path)
    {
        (ReadOnlyMemory<byte>? text, string? problem) = LabSnapshotSource.ReadFile(path);
        return text is { } known ? LabFileReader.Read(known).Findings : [LabSnapshotSource.Unreadable(path, problem)];
    }

    private static int Report(TextWriter output, List<Finding> findings, bool asJson, bool hasLabFile)
    {
        if (asJson)
        {
            FindingPrinter.WriteJson(output, findings);
        }
        else
        {
            FindingPrinter.Write(output, findings);
            string what = hasLabFile ? "lab file and options" : "options (no lab file was named: add --lab FILE)";
            output.WriteLine(findings.Count == 0 ? $"No findings: {what}." : FormattableString.Invariant($"{findings.Count} finding(s): {what}."));
        }

        return findings.Count == 0 ? ExitCode.Success : ExitCode.BadInput;
    }
}
