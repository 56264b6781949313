using System.CommandLine;
using System.Globalization;
using LabWatch.Lab.Findings;
using LabWatch.Records;
using LabWatch.Service.Backup;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch backup</c>: a whole, consistent copy of a data directory, also while the service runs.</summary>
internal static class BackupCommand
{
    private static readonly Option<FileInfo> To = new("--to") { Description = "Directory to make, or file ending in .tar. Never overwritten.", HelpName = "DIR|FILE", Required = true };

    public static Command Create()
    {
        Command command = new("backup", "Copy everything that the service keeps, while it runs, with the digest of every file.") { CommonOptions.Data, To, CommonOptions.Config };
        command.SetAction((parsed, cancellationToken) => Task.FromResult(Run(parsed, cancellationToken)));
        return command;
    }

    private static int Run(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter output = parsed.InvocationConfiguration.Output;
        TextWriter error = parsed.InvocationConfiguration.Error;
        string data = Path.GetFullPath(parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch"));
        string target = Path.TrimEndingDirectorySeparator(parsed.GetValue(To)!.FullName);
        (IReadOnlyList<string> notContained, IReadOnlyList<Finding> findings) = Look(parsed, data);
        BackupWriter writer = new(data, target, notContained, TimeProvider.System, path => error.WriteLine("  " + path));
        findings = [.. findings, .. writer.Check()];
        if (findings.Count > 0)
        {
            FindingPrinter.Write(error, findings);
            return ExitCode.BadInput;
        }

        try
        {
            using FileStream held = BackupLock.Take(data);
            (BackupManifest manifest, string digest) = writer.Run(cancellationToken);
            output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"Backed up {manifest.Files.Count} files, {manifest.Files.Sum(file => file.Bytes):N0} bytes, to {target}"));
            output.WriteLine($"SHA-256 of {BackupManifest.FileName}: {digest}");
            foreach (string missing in notContained)
            {
                output.WriteLine($"Not contained: {missing}");
            }

            return ExitCode.Success;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException or Microsoft.Data.Sqlite.SqliteException)
        {
            FindingPrinter.Write(error, [new Finding("backup-failed", "--to", "The backup did not come to its end: " + exception.Message, target, "Make room or choose another place, and start again. What was begun ends in .partial.")]);
            return ExitCode.Failure;
        }
    }

    private static (IReadOnlyList<string> NotContained, IReadOnlyList<Finding> Findings) Look(ParseResult parsed, string data)
    {
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
        if (configuration is null)
        {
            return ([], unreadable);
        }

        if (!Directory.Exists(data))
        {
            return ([], [new Finding("data-missing", "--data", "The directory is not there.", data, "Name the data directory of the service, for example --data /var/lib/labwatch.")]);
        }

        RecordsOptions records = SettingsReader.Read(configuration, data, "backup").Settings.Records;
        return records.Provider is RecordsProvider.Sqlite
            ? ([DataFiles.KeysNote], [])
            : ([DataFiles.KeysNote, "The records, which are in PostgreSQL: dump them with its own tools before each backup of this directory, and keep both together."], []);
    }
}
