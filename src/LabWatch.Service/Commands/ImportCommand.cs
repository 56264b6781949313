using System.CommandLine;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Revisions;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch import lab</c>: brings a lab file on record while the service is stopped, and says what it changes.</summary>
internal static class ImportCommand
{
    private static readonly Argument<FileInfo> File = new("FILE") { Description = "The lab file." };
    private static readonly Option<bool> DryRun = new("--dry-run") { Description = "Say what would change, and change nothing." };

    public static Command Create()
    {
        Command lab = new("lab", "Import a lab file: what it changes becomes revisions of the records.")
        {
            File, CommonOptions.Data, CommonOptions.Config, LabFileOptions.Accept, LabFileOptions.Reason, DryRun,
        };
        lab.SetAction(RunAsync);
        return new Command("import", "Bring something on record.") { lab, ImportReadingsCommand.Create() };
    }

    private static async Task<int> RunAsync(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
        (LabOrder? order, Finding? missing) = LabFileOptions.Read(parsed.GetValue(File)!.FullName, parsed);
        (DataDirectory? data, Finding? notUsable) = DataDirectory.Open(parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch"));
        using (data)
        {
            IReadOnlyList<Finding> findings = [.. unreadable, .. missing is null ? [] : new[] { missing }, .. notUsable is null ? [] : new[] { notUsable }];
            RecordsOptions? options = configuration is null || data is null ? null : SettingsReader.Read(configuration, data.Path, "import").Settings.Records;
            if (findings.Count > 0 || options is null || order is null || data is null)
            {
                FindingPrinter.Write(error, findings);
                return ExitCode.BadInput;
            }

            if (options.Validate() is { Count: > 0 } wrong)
            {
                FindingPrinter.Write(error, wrong);
                return ExitCode.BadInput;
            }

            return await ImportAsync(parsed, order, options, data, cancellationToken);
        }
    }

    private static async Task<int> ImportAsync(ParseResult parsed, LabOrder order, RecordsOptions options, DataDirectory data, CancellationToken cancellationToken)
    {
        await using ServiceProvider services = new ServiceCollection().AddLabWatchRecords(options).BuildServiceProvider();
        try
        {
            LabImportOutcome outcome = await services.GetRequiredService<ILabRecords>().ImportAsync(
                new LabImportOrder(order.Document, order.FileName, order.Author, Instant.Now(TimeProvider.System))
                {
                    Reason = order.Reason,
                    Accept = order.Accept,
                    DryRun = parsed.GetValue(DryRun),
                },
                cancellationToken);
            if (outcome.Records?.Compose() is { } text)
            {
                LabSnapshotSource.Of(text, LabSnapshotSource.CachePath(data.Path)).Source?.Keep();
            }

            return Report(parsed, outcome);
        }
        catch (RecordsVersionException exception)
        {
            return Newer(parsed.InvocationConfiguration.Error, exception);
        }
        catch (RecordsUnavailableException exception)
        {
            FindingPrinter.Write(parsed.InvocationConfiguration.Error, [new Finding("records-unavailable", "Records", exception.Message, null, "Try again when the database answers.")]);
            return ExitCode.Failure;
        }
    }

    private static int Newer(TextWriter error, RecordsVersionException exception)
    {
        FindingPrinter.Write(error, [LabStart.Newer(exception)]);
        return ExitCode.BadInput;
    }

    private static int Report(ParseResult parsed, LabImportOutcome outcome)
    {
        TextWriter output = parsed.InvocationConfiguration.Output;
        foreach (LabChange change in outcome.Plan.Changes)
        {
            output.WriteLine($"{change.What,-10}{change.Subject}");
        }

        FindingPrinter.Write(parsed.InvocationConfiguration.Error, outcome.Refused);
        int changes = outcome.Plan.Revisions.Count;
        output.WriteLine(
            outcome.Refused.Count > 0 ? FormattableString.Invariant($"Not imported: {outcome.Refused.Count} finding(s).")
            : parsed.GetValue(DryRun) ? FormattableString.Invariant($"{changes} record(s) would change; nothing was changed.")
            : outcome.Import is { } import ? FormattableString.Invariant($"{changes} record(s) changed; import {import.Sequence} of {import.Site}, digest {import.Digest}.")
            : "Nothing was changed.");
        return outcome.Refused.Count > 0 ? ExitCode.BadInput : ExitCode.Success;
    }
}
