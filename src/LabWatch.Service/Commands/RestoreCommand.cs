using System.CommandLine;
using System.Globalization;
using LabWatch.Evidence.Verification;
using LabWatch.Lab.Findings;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Service.Backup;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch restore</c>: a backup into an empty data directory, compared file by file and verified against the trail.</summary>
internal static class RestoreCommand
{
    private static readonly Option<FileInfo> From = new("--from") { Description = "Directory or .tar file that labwatch backup made.", HelpName = "DIR|FILE", Required = true };

    public static Command Create()
    {
        Command command = new("restore", "Put a backup into an empty directory, compare every file with its digest, and verify the whole.") { From, CommonOptions.Data, CommonOptions.Config };
        command.SetAction((parsed, cancellationToken) => Task.FromResult(Run(parsed, cancellationToken)));
        return command;
    }

    private static int Run(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        string data = Path.GetFullPath(parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch"));
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> findings) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
        findings = [.. findings, .. Refuse(data)];
        if (configuration is null || findings.Count > 0)
        {
            FindingPrinter.Write(error, findings);
            return ExitCode.BadInput;
        }

        (DataDirectory? directory, Finding? unusable) = DataDirectory.Open(data);
        if (directory is null)
        {
            FindingPrinter.Write(error, [unusable!]);
            return ExitCode.BadInput;
        }

        using (directory)
        {
            return Restore(parsed, data, SettingsReader.Read(configuration, data, "restore").Settings, cancellationToken);
        }
    }

    private static int Restore(ParseResult parsed, string data, ServiceSettings settings, CancellationToken cancellationToken)
    {
        TextWriter output = parsed.InvocationConfiguration.Output;
        TextWriter error = parsed.InvocationConfiguration.Error;
        string marker = Path.Combine(data, DataFiles.RestoreMarker);
        File.WriteAllText(marker, "This directory holds part of a backup. Delete it and restore again.\n");
        BackupReader reader = new(parsed.GetValue(From)!.FullName, data, path => error.WriteLine("  " + path));
        try
        {
            if (reader.Run(cancellationToken) is { Count: > 0 } wrong)
            {
                FindingPrinter.Write(error, wrong);
                return reader.Manifest is null ? ExitCode.BadInput : ExitCode.TamperingFound;
            }
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            FindingPrinter.Write(error, [new Finding("restore-failed", "--data", "The restore did not come to its end: " + exception.Message, data, "Make room or choose another directory; delete this one and restore again.")]);
            return ExitCode.Failure;
        }

        File.Delete(marker);
        output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"Restored {reader.Manifest!.Files.Count} files of the backup of {reader.Manifest.At} to {data}; each has the digest that its manifest says."));
        return Verify(parsed, data, settings.Records, settings.Readings);
    }

    private static int Verify(ParseResult parsed, string data, RecordsOptions records, ReadingsOptions readings)
    {
        if (records.Provider is not RecordsProvider.Sqlite || !File.Exists(records.FilePath))
        {
            parsed.InvocationConfiguration.Output.WriteLine("The records are not in this directory; restore them with the tools of PostgreSQL, then run labwatch verify.");
            return ExitCode.Success;
        }

        (VerifyReport? report, IReadOnlyList<Finding> unfit) = DataVerifier.Run(new VerifyRequest(data, records, []) { Readings = readings });
        if (report is null)
        {
            FindingPrinter.Write(parsed.InvocationConfiguration.Error, unfit);
            return ExitCode.BadInput;
        }

        VerifyPrinter.Write(parsed.InvocationConfiguration.Output, report, data);
        return report.IsClean ? ExitCode.Success : ExitCode.TamperingFound;
    }

    private static IReadOnlyList<Finding> Refuse(string data) =>
        File.Exists(data) || (Directory.Exists(data) && Directory.EnumerateFileSystemEntries(data).Any())
            ? [new Finding("data-not-empty", "--data", "There is something in this directory already; a restore never overwrites.", data, "Name a directory that is empty or not there yet.")]
            : [];
}
