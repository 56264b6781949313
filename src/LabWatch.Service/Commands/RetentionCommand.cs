using System.CommandLine;
using LabWatch.Evidence.Recording;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Retention;
using LabWatch.Records;
using LabWatch.Records.Audit;
using LabWatch.Records.Revisions;
using LabWatch.Service.Backup;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch retention</c>: lists raw readings that are older than the rules demand, and removes them only when told to, on the record.</summary>
internal static class RetentionCommand
{
    private const double DaysAYear = 365.25;

    private static readonly Option<bool> Apply = new("--apply") { Description = "Remove what is listed. Without it nothing is changed." };
    private static readonly Option<string> By = new("--by") { Description = "Who orders the removal; goes into the trail.", HelpName = "NAME" };
    private static readonly Option<string> Reason = new("--reason") { Description = "Why, for example the clause of the quality system; goes into the trail.", HelpName = "TEXT" };

    public static Command Create()
    {
        Command command = new("retention", "List raw readings that are older than they must be kept (Readings:Retention), with the service stopped; with --apply remove them.") { CommonOptions.Data, CommonOptions.Config, Apply, By, Reason };
        command.Validators.Add(result =>
        {
            if (result.GetValue(Apply) && (string.IsNullOrWhiteSpace(result.GetValue(By)) || string.IsNullOrWhiteSpace(result.GetValue(Reason))))
            {
                result.AddError("--apply needs --by and --reason: a removal is entered in the trail with both.");
            }
        });
        command.SetAction(RunAsync);
        return command;
    }

    private static async Task<int> RunAsync(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        string path = parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch");
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> findings) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
        (DataDirectory? data, Finding? notUsable) = Directory.Exists(path)
            ? DataDirectory.Open(path)
            : (null, new Finding("no-data", "--data", "There is no such data directory.", path, "Name the directory that the service uses."));
        using (data)
        {
            findings = notUsable is null ? findings : [.. findings, notUsable];
            ServiceSettings? settings = null;
            if (configuration is not null && data is not null)
            {
                (settings, IReadOnlyList<Finding> wrong) = SettingsReader.Read(configuration, data.Path, InstallationId.Of(data.Path));
                findings = [.. findings, .. wrong, .. Refuse(settings)];
            }

            if (findings.Count > 0 || settings is null || data is null)
            {
                FindingPrinter.Write(error, findings);
                return ExitCode.BadInput;
            }

            try
            {
                using FileStream held = BackupLock.Take(data.Path);
                return await RunAsync(parsed, settings, data.Path, cancellationToken);
            }
            catch (Exception exception) when (exception is RecordsUnavailableException or StoreUnavailableException or IOException)
            {
                FindingPrinter.Write(error, [new Finding("store-unavailable", "--data", exception.Message, data.Path, "Stop the service, wait for a backup that is running, and try again.")]);
                return ExitCode.Failure;
            }
        }
    }

    private static IReadOnlyList<Finding> Refuse(ServiceSettings settings) =>
        settings.Readings.Retention.Count == 0
            ? [new Finding("no-rules", "Readings:Retention", "No rule says how long readings must be kept, so all are kept for ever.", null, "State the years that the quality system demands, for example Readings:Retention:0:Quantity = WellThermometer and Readings:Retention:0:Years = 10.")]
            : settings.Readings.Engine is not ReadingsEngine.Sqlite
            ? [new Finding("other-engine", "Readings:Engine", "Readings in another engine than the file are not removed by this command.", settings.Readings.Engine.ToString(), "Use the means of that database.")]
            : [];

    private static async Task<int> RunAsync(ParseResult parsed, ServiceSettings settings, string data, CancellationToken cancellationToken)
    {
        TextWriter output = parsed.InvocationConfiguration.Output;
        await using ServiceProvider services = new ServiceCollection().AddLabWatchRecords(settings.Records).BuildServiceProvider();
        Dictionary<ChannelKey, ChannelQuantity> quantities = await QuantitiesAsync(services.GetRequiredService<ILabRecords>(), cancellationToken);
        Instant now = Instant.Now(TimeProvider.System);
        using ReadingRemover remover = ReadingRemover.Open(data);
        bool isApplied = parsed.GetValue(Apply);
        RetentionList list = new();
        List<RemovablePart> day = [];
        foreach (RemovablePart part in remover.Find(channel => KeepFrom(settings.Readings.Retention, quantities, channel, now), now, cancellationToken))
        {
            list.Add(part);
            if (isApplied && day.Count > 0 && (day[0].Source != part.Source || day[0].Hour.Floor(24 * Instant.MicrosecondsPerHour) != part.Hour.Floor(24 * Instant.MicrosecondsPerHour)))
            {
                await RemoveAsync(day);
            }

            if (isApplied)
            {
                day.Add(part);
            }
        }

        if (day.Count > 0)
        {
            await RemoveAsync(day);
        }

        if (isApplied)
        {
            remover.ReleaseSpace();
        }

        list.Write(output, isApplied);
        return ExitCode.Success;

        async Task RemoveAsync(List<RemovablePart> parts)
        {
            // The trail first: a removal that nobody knows of must not be possible, one that is told of and did not happen harms nothing.
            Instant at = Instant.Now(TimeProvider.System);
            IAuditLedger trail = services.GetRequiredService<IAuditLedger>();
            await trail.AppendAsync(RemovalNote.Of(parts, at, parsed.GetValue(By)!.Trim(), parsed.GetValue(Reason)!.Trim()), cancellationToken);
            remover.Remove(parts, at);
            parts.Clear();
        }
    }

    private static Instant? KeepFrom(IReadOnlyList<RetentionRule> rules, Dictionary<ChannelKey, ChannelQuantity> quantities, ChannelKey channel, Instant now)
    {
        RetentionRule? rule = (quantities.TryGetValue(channel, out ChannelQuantity quantity) ? rules.FirstOrDefault(one => one.Quantity == quantity) : null)
            ?? rules.FirstOrDefault(one => one.Quantity is null);
        return rule is null ? null : now - TimeSpan.FromDays(rule.Years * DaysAYear);
    }

    private static async Task<Dictionary<ChannelKey, ChannelQuantity>> QuantitiesAsync(ILabRecords records, CancellationToken cancellationToken)
    {
        Dictionary<ChannelKey, ChannelQuantity> quantities = [];
        foreach (string site in await records.SitesAsync(cancellationToken))
        {
            LabSnapshot? lab = LabFileReader.Read((await records.ReadAsync(site, cancellationToken)).Compose() ?? default).Snapshot;
            foreach (Channel channel in lab?.Sources.SelectMany(source => source.Channels) ?? [])
            {
                quantities[channel.Key] = channel.Quantity;
            }
        }

        return quantities;
    }
}
