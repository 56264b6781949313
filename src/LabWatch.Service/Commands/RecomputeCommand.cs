using System.CommandLine;
using LabWatch.Assessments;
using LabWatch.Assessments.Recomputation;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Revisions;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch recompute</c>: computes assessments on record again, from the same readings and records, and says whether they are the same.</summary>
internal static class RecomputeCommand
{
    private static readonly Option<string[]> Source = new("--source") { Description = "Only this source; may be given several times.", HelpName = "ID" };
    private static readonly Option<string[]> Criterion = MakeCriterion();
    private static readonly Option<string> From = MakeInstant("--from", "Only windows that end then or later (RFC 3339, for example 2026-03-01T00:00:00Z).");
    private static readonly Option<string> Until = MakeInstant("--until", "Only windows that end before then (RFC 3339).");
    private static readonly Option<string> Reason = new("--reason") { Description = "Record what differs as revisions that supersede, for this reason. Without it nothing is recorded.", HelpName = "TEXT" };
    private static readonly Option<FileInfo> Json = new("--json") { Description = "Write all that is not identical as JSON to this file, too.", HelpName = "FILE" };

    public static Command Create()
    {
        Command command = new("recompute", "Compute assessments on record again and compare them, with the service stopped or on a restored backup.")
        {
            CommonOptions.Data, CommonOptions.Config, Source, Criterion, From, Until, Reason, Json,
        };
        command.SetAction(RunAsync);
        return command;
    }

    private static async Task<int> RunAsync(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        string path = parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch");
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
        (DataDirectory? data, Finding? notUsable) = Directory.Exists(path)
            ? DataDirectory.Open(path)
            : (null, new Finding("no-data", "--data", "There is no such data directory.", path, "Name the directory that the service uses, or a restored backup."));
        using (data)
        {
            if (configuration is null || data is null)
            {
                FindingPrinter.Write(error, notUsable is null ? unreadable : [.. unreadable, notUsable]);
                return ExitCode.BadInput;
            }

            (ServiceSettings settings, IReadOnlyList<Finding> findings) = SettingsReader.Read(configuration, data.Path, InstallationId.Of(data.Path));
            if (findings.Count > 0)
            {
                FindingPrinter.Write(error, findings);
                return ExitCode.BadInput;
            }

            try
            {
                return await RecomputeAsync(parsed, settings, cancellationToken);
            }
            catch (Exception exception) when (exception is RecordsUnavailableException or StoreUnavailableException)
            {
                FindingPrinter.Write(error, [new Finding("store-unavailable", "--data", exception.Message, data.Path, "Try again when the database answers.")]);
                return ExitCode.Failure;
            }
            catch (RecordsVersionException exception)
            {
                FindingPrinter.Write(error, [LabStart.Newer(exception)]);
                return ExitCode.BadInput;
            }
        }
    }

    private static async Task<int> RecomputeAsync(ParseResult parsed, ServiceSettings settings, CancellationToken cancellationToken)
    {
        await using ServiceProvider services = new ServiceCollection()
            .AddLabWatchRecords(settings.Records)
            .AddLabWatchReadings(settings.Readings)
            .AddLabWatchAssessments(settings.Assessments)
            .BuildServiceProvider();
        ILabRecords records = services.GetRequiredService<ILabRecords>();
        using ProgressLine progress = new(parsed.InvocationConfiguration.Error);
        RecomputeTally tally = new(parsed.InvocationConfiguration, progress);
        foreach (string site in await records.SitesAsync(cancellationToken))
        {
            LabFileResult lab = LabFileReader.Read((await records.ReadAsync(site, cancellationToken)).Compose() ?? default);
            if (lab.Snapshot is not { } snapshot)
            {
                FindingPrinter.Write(parsed.InvocationConfiguration.Error, lab.Findings);
                return ExitCode.BadInput;
            }

            if (UnknownSources(parsed, snapshot.Sources.Select(source => source.Key.Source)) is { Count: > 0 } unknown)
            {
                FindingPrinter.Write(parsed.InvocationConfiguration.Error, unknown);
                return ExitCode.BadInput;
            }

            await foreach (RecomputedAssessment item in services.GetRequiredService<Recomputer>().RunAsync(snapshot, Request(parsed), cancellationToken))
            {
                tally.Take(item);
            }
        }

        return tally.Finish(parsed.GetValue(Json));
    }

    private static RecomputeRequest Request(ParseResult parsed)
    {
        Instant? from = InstantOf(parsed.GetValue(From)), until = InstantOf(parsed.GetValue(Until));
        TimeWindow? window = from is null && until is null ? null : new TimeWindow(from ?? new Instant(0), until ?? new Instant(long.MaxValue));
        return new(window, parsed.GetValue(Source) ?? [], parsed.GetValue(Criterion) ?? [], string.IsNullOrWhiteSpace(parsed.GetValue(Reason)) ? null : parsed.GetValue(Reason));
    }

    private static IReadOnlyList<Finding> UnknownSources(ParseResult parsed, IEnumerable<string> known) =>
        [.. (parsed.GetValue(Source) ?? [])
            .Where(id => !known.Contains(id, StringComparer.Ordinal))
            .Select(id => new Finding("unknown-source", "--source", "There is no such source.", Finding.Quote(id), $"The sources are: {string.Join(", ", known)}."))];

    private static Instant? InstantOf(string? text) => Instant.TryParse(text, out Instant instant) ? instant : null;

    private static Option<string[]> MakeCriterion()
    {
        Option<string[]> option = new("--criterion") { Description = "Only this criterion; may be given several times.", HelpName = "CODE" };
        option.Validators.Add(result =>
        {
            foreach (string code in result.Tokens.Select(token => token.Value).Where(code => !CriterionCode.All.Contains(code)))
            {
                result.AddError($"--criterion: \"{Finding.Quote(code)}\" is none of {string.Join(", ", CriterionCode.All)}.");
            }
        });
        return option;
    }

    private static Option<string> MakeInstant(string name, string description)
    {
        Option<string> option = new(name) { Description = description, HelpName = "TIME" };
        option.Validators.Add(result =>
        {
            foreach (string text in result.Tokens.Select(token => token.Value).Where(text => !Instant.TryParse(text, out _)))
            {
                result.AddError($"{name}: \"{Finding.Quote(text)}\" is not a time like 2026-03-01T00:00:00Z.");
            }
        });
        return option;
    }
}
