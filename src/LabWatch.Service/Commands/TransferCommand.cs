using System.CommandLine;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Transfer;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch transfer</c>: copies all readings from one engine to another with the service stopped, and compares both sides afterwards.</summary>
internal static class TransferCommand
{
    private const int MostListed = 20;

    private static readonly Option<ReadingsEngine> From = Engine("--from", "Engine that has the readings.");
    private static readonly Option<ReadingsEngine> To = Engine("--to", "Engine that is to have them; its options stand in the section Readings.");
    private static readonly Option<bool> VerifyOnly = new("--verify-only") { Description = "Copy nothing, compare both sides." };

    public static Command Create()
    {
        Command command = new("transfer", "Copy all readings from one engine to another with the service stopped, and compare both. Started again, it goes on where it was.")
        {
            From, To, CommonOptions.Data, CommonOptions.Config, VerifyOnly,
        };
        command.Validators.Add(result =>
        {
            if (result.GetValue(From) == result.GetValue(To))
            {
                result.AddError("--from and --to name the same engine.");
            }
        });
        command.SetAction(RunAsync);
        return command;
    }

    private static async Task<int> RunAsync(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        string path = parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch");
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
        (DataDirectory? data, Finding? notUsable) = DataDirectory.Open(path);
        using (data)
        {
            if (configuration is null || data is null)
            {
                FindingPrinter.Write(error, [.. unreadable, .. notUsable is null ? [] : new[] { notUsable }]);
                return ExitCode.BadInput;
            }

            (ServiceSettings settings, IReadOnlyList<Finding> findings) = SettingsReader.Read(configuration, data.Path, InstallationId.Of(data.Path));
            ReadingsOptions from = settings.Readings with { Engine = parsed.GetValue(From) }, to = settings.Readings with { Engine = parsed.GetValue(To) };
            findings = [.. findings, .. from.Validate().Concat(to.Validate()).Select(one => one with { Where = "Readings:" + one.Where.Replace('.', ':') }).Except(findings).Distinct()];
            if (findings.Count > 0)
            {
                FindingPrinter.Write(error, findings);
                return ExitCode.BadInput;
            }

            return await TryAsync(parsed, from, to, cancellationToken);
        }
    }

    private static async Task<int> TryAsync(ParseResult parsed, ReadingsOptions from, ReadingsOptions to, CancellationToken cancellationToken)
    {
        try
        {
            bool isCopied = parsed.GetValue(VerifyOnly) || await CopyAsync(parsed, from, to, cancellationToken);
            bool isSame = await VerifyAsync(parsed, from, to, cancellationToken);
            return isCopied && isSame ? ExitCode.Success : ExitCode.TamperingFound;
        }
        catch (StoreUnavailableException unavailable)
        {
            FindingPrinter.Write(parsed.InvocationConfiguration.Error, [new Finding(
                "store-unavailable", "Readings", unavailable.Message, null, "Start the same command again when the database answers and no service writes it; it goes on where it was.")]);
            return ExitCode.Failure;
        }
    }

    private static async Task<bool> CopyAsync(ParseResult parsed, ReadingsOptions fromOptions, ReadingsOptions toOptions, CancellationToken cancellationToken)
    {
        TextWriter output = parsed.InvocationConfiguration.Output;
        using ProgressLine progress = new(parsed.InvocationConfiguration.Error);
        long? parts = ReadingTransfer.CopyBlocks(fromOptions, toOptions, (done, all) => progress.Report(FormattableString.Invariant($"copying, sealed parts of {all:N0}"), done), cancellationToken);
        await using ReadingEngine from = ReadingEngine.Create(fromOptions, TimeProvider.System, NullLoggerFactory.Instance);
        await using ReadingEngine to = ReadingEngine.Create(toOptions, TimeProvider.System, NullLoggerFactory.Instance);
        int messages = ReadingEngine.ShareQuarantine(fromOptions.Engine, toOptions.Engine) ? 0 : await ReadingTransfer.CopyQuarantineAsync(from.Quarantine, to.Quarantine, cancellationToken);
        if (parts is { } copied)
        {
            progress.Dispose();
            output.WriteLine(FormattableString.Invariant($"Copied {copied:N0} sealed parts as they are, with their digests, and the running hours; {messages:N0} messages of the quarantine."));
            return true;
        }

        TransferCopy copy = await ReadingTransfer.CopyAsync(from, to, (done, all) => progress.Report(FormattableString.Invariant($"copying, hours of {all:N0}"), done), cancellationToken);
        progress.Dispose();
        output.WriteLine(FormattableString.Invariant(
            $"Copied {copy.Readings:N0} readings: {copy.Hours:N0} hours of sources, {copy.HoursThereAlready:N0} of them were there already; {messages:N0} messages of the quarantine."));
        foreach (ReadingConflict conflict in copy.Conflicts.Take(MostListed))
        {
            output.WriteLine(FormattableString.Invariant(
                $"    another value stands in the target: {conflict.Source} {conflict.Refused.Channel} {conflict.Refused.Time}: {conflict.StoredValue:R}, not {conflict.Refused.Value:R}"));
        }

        return copy.Conflicts.Count == 0;
    }

    private static async Task<bool> VerifyAsync(ParseResult parsed, ReadingsOptions fromOptions, ReadingsOptions toOptions, CancellationToken cancellationToken)
    {
        TextWriter output = parsed.InvocationConfiguration.Output;
        using ProgressLine progress = new(parsed.InvocationConfiguration.Error);
        await using ReadingEngine from = ReadingEngine.Create(fromOptions, TimeProvider.System, NullLoggerFactory.Instance);
        await using ReadingEngine to = ReadingEngine.Create(toOptions, TimeProvider.System, NullLoggerFactory.Instance);
        TransferCheck check = await ReadingTransfer.VerifyAsync(
            from.Store, to.Store, (done, all) => progress.Report(FormattableString.Invariant($"comparing, hours of {all:N0}"), done), cancellationToken);
        progress.Dispose();
        output.WriteLine(FormattableString.Invariant(
            $"Compared {check.Hours:N0} hours of sources with {check.Readings:N0} readings by SHA-256: {check.Different.Count:N0} differ. The target has {check.OthersHours:N0} hours besides."));
        foreach ((SourceKey source, Instant hour) in check.Different.Take(MostListed))
        {
            output.WriteLine($"    differs: {source} {hour}");
        }

        return check.Different.Count == 0;
    }

    private static Option<ReadingsEngine> Engine(string name, string description) => new(name)
    {
        Description = description,
        HelpName = "sqlite|postgresql|influxdb",
        Required = true,
    };
}
