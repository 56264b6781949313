using System.CommandLine;
using System.Globalization;
using LabWatch.Evidence.Verification;
using LabWatch.Lab.Findings;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Audit;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch verify</c>: checks a data directory against its audit trail, beside a running service or without one.</summary>
internal static class VerifyCommand
{
    private const int DigestLength = 64;

    private static readonly Option<FileInfo> Json = new("--json") { Description = "Write the report as JSON to this file, too.", HelpName = "FILE" };
    private static readonly Option<string[]> Head = MakeHead();

    public static Command Create()
    {
        Command command = new("verify", "Check every record and every sealed reading against the audit trail. Changes nothing.")
        {
            CommonOptions.Data, CommonOptions.Config, Head, Json,
        };
        command.SetAction(Run);
        return command;
    }

    private static int Run(ParseResult parsed)
    {
        string data = Path.GetFullPath(parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch"));
        (RecordsOptions? options, ReadingsOptions? readings, IReadOnlyList<Finding> findings) = Options(parsed, data);
        if (options is null || findings.Count > 0)
        {
            FindingPrinter.Write(parsed.InvocationConfiguration.Error, findings);
            return ExitCode.BadInput;
        }

        using ProgressLine progress = new(parsed.InvocationConfiguration.Error);
        (VerifyReport? report, IReadOnlyList<Finding> unfit) = DataVerifier.Run(new VerifyRequest(data, options, Noted(parsed)) { Readings = readings }, progress.Report);
        progress.Dispose();
        if (report is null)
        {
            FindingPrinter.Write(parsed.InvocationConfiguration.Error, unfit);
            return ExitCode.BadInput;
        }

        VerifyPrinter.Write(parsed.InvocationConfiguration.Output, report, data);
        if (parsed.GetValue(Json) is { } file)
        {
            using FileStream stream = File.Create(file.FullName);
            VerifyPrinter.WriteJson(stream, report, data, TimeProvider.System.GetUtcNow());
        }

        return report.IsClean ? ExitCode.Success : ExitCode.TamperingFound;
    }

    private static (RecordsOptions? Options, ReadingsOptions? Readings, IReadOnlyList<Finding> Findings) Options(ParseResult parsed, string data)
    {
        (Microsoft.Extensions.Configuration.IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
        if (configuration is null)
        {
            return (null, null, unreadable);
        }

        ServiceSettings settings = SettingsReader.Read(configuration, data, "verify").Settings;
        RecordsOptions options = settings.Records;
        return options.Validate() is { Count: > 0 } wrong ? (null, null, wrong)
            : settings.Readings.Validate() is { Count: > 0 } wrongReadings ? (null, null, wrongReadings)
            : !Directory.Exists(data) ? (null, null, [Missing("The directory is not there.", data)])
            : options.Provider is RecordsProvider.Sqlite && !File.Exists(options.FilePath) ? (null, null, [Missing($"There is no {RecordsOptions.FileName} in the directory.", data)])
            : (options, settings.Readings, []);
    }

    private static Finding Missing(string message, string data) =>
        new("data-missing", "--data", message, data, "Name the data directory of the service, for example --data /var/lib/labwatch.");

    private static IReadOnlyList<(string? Site, AuditHead Head)> Noted(ParseResult parsed) =>
        [.. (parsed.GetValue(Head) ?? []).Select(text => ParseHead(text)!.Value)];

    private static Option<string[]> MakeHead()
    {
        Option<string[]> option = new("--head") { Description = "End of the chain that was noted earlier; may be given several times.", HelpName = "[SITE/]NUMBER:DIGEST" };
        option.Validators.Add(result =>
        {
            foreach (string text in result.Tokens.Select(token => token.Value).Where(text => ParseHead(text) is null))
            {
                result.AddError($"--head: \"{Finding.Quote(text)}\" is not NUMBER:DIGEST with 64 hexadecimal digits, as verify prints it.");
            }
        });
        return option;
    }

    private static (string? Site, AuditHead Head)? ParseHead(string text)
    {
        int slash = text.IndexOf('/', StringComparison.Ordinal);
        string[] parts = text[(slash + 1)..].Split(':');
        return parts.Length == 2 && long.TryParse(parts[0], NumberStyles.None, CultureInfo.InvariantCulture, out long number) && number > 0
            && parts[1].Length == DigestLength && parts[1].All(char.IsAsciiHexDigit)
            ? (slash > 0 ? text[..slash] : null, new AuditHead(number, parts[1].ToLowerInvariant()))
            : null;
    }
}
