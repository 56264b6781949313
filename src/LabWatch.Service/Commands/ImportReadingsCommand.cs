using System.CommandLine;
using System.Globalization;
using LabWatch.Intake.Brokers.External;
using LabWatch.Intake.Import;
using LabWatch.Intake.Options;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Secrets;
using LabWatch.Readings;
using LabWatch.Readings.Quarantine;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;
using MQTTnet;

namespace LabWatch.Service.Commands;

/// <summary>
/// <c>labwatch import readings</c>: brings readings of the past in from delimited text: into the data directory while the service is stopped,
/// or by MQTT to a service that runs (<c>--broker</c>).
/// </summary>
internal static class ImportReadingsCommand
{
    private const int MostShown = 50;
    private static readonly Argument<FileInfo> File = new("FILE") { Description = "Delimited text (CSV) with a header." };
    private static readonly Option<string> TimeColumn = new("--time-column") { Description = "Column of the time.", HelpName = "NAME", DefaultValueFactory = _ => "time" };
    private static readonly Option<string> TimeFormat = new("--time-format") { Description = "iso, unix, unix-ms, unix-us, or a pattern such as \"dd.MM.yyyy HH:mm:ss\".", HelpName = "FORMAT", DefaultValueFactory = _ => "iso" };
    private static readonly Option<string> TimeZone = new("--time-zone") { Description = "Zone of times without an offset: UTC, Europe/Dublin, +01:00.", HelpName = "ZONE" };
    private static readonly Option<string> Source = new("--source") { Description = "Source of channels that are named by their id alone.", HelpName = "ID" };
    private static readonly Option<string[]> Column = new("--column") { Description = "COLUMN=[SOURCE/]CHANNEL[:UNIT], once for each column of values. Left out: columns that are named like channels.", HelpName = "MAP" };
    private static readonly Option<string> ChannelColumn = new("--channel-column") { Description = "For one value a row: column that names the channel.", HelpName = "NAME" };
    private static readonly Option<string> ValueColumn = new("--value-column") { Description = "For one value a row: column of the value.", HelpName = "NAME", DefaultValueFactory = _ => "value" };
    private static readonly Option<string> UnitColumn = new("--unit-column") { Description = "For one value a row: column of the unit.", HelpName = "NAME" };
    private static readonly Option<string> Delimiter = new("--delimiter") { Description = "What separates fields; the word tab for a tabulator.", HelpName = "CHAR", DefaultValueFactory = _ => "," };
    private static readonly Option<bool> DecimalComma = new("--decimal-comma") { Description = "Numbers have a comma for the decimal point." };
    private static readonly Option<bool> DryRun = new("--dry-run") { Description = "Say what would be refused, and change nothing." };
    private static readonly Option<string> Broker = new("--broker") { Description = "Publish to this broker for a service that runs, instead of writing to the data directory.", HelpName = "HOST:PORT" };
    private static readonly Option<bool> Tls = new("--tls") { Description = "Speak TLS to the broker." };
    private static readonly Option<FileInfo> Authorities = new("--authorities") { Description = "PEM file of the authorities to trust for the broker.", HelpName = "FILE" };
    private static readonly Option<string> User = new("--user") { Description = "User at the broker.", HelpName = "NAME" };
    private static readonly Option<string> PasswordSecret = new("--password-secret") { Description = "Name of the secret with the password.", HelpName = "NAME" };

    public static Command Create()
    {
        Delimiter.Validators.Add(result =>
        {
            if (Separator(result.GetValueOrDefault<string>()) is null)
            {
                result.AddError("--delimiter: give one character other than a quote, or the word tab.");
            }
        });
        Command command = new("readings", "Bring readings of the past in from delimited text.")
        {
            File, TimeColumn, TimeFormat, TimeZone, Source, Column, ChannelColumn, ValueColumn, UnitColumn, Delimiter, DecimalComma, DryRun,
            Broker, Tls, Authorities, User, PasswordSecret, CommonOptions.Data, CommonOptions.Config,
        };
        command.SetAction(RunAsync);
        return command;
    }

    private static async Task<int> RunAsync(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        string dataPath = Path.GetFullPath(parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch"));
        bool direct = parsed.GetValue(Broker) is null && !parsed.GetValue(DryRun);
        (DataDirectory? data, Finding? notUsable) = direct ? DataDirectory.Open(dataPath) : (null, null);
        using (data)
        {
            (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(parsed.GetValue(CommonOptions.Config)?.FullName);
            string cache = LabSnapshotSource.CachePath(dataPath);
            (ReadOnlyMemory<byte>? text, string? problem) = LabSnapshotSource.ReadFile(cache);
            LabSnapshotSource? lab = text is { } known ? LabSnapshotSource.Of(known, cache).Source : null;
            string file = parsed.GetValue(File)!.FullName;
            List<Finding> findings = [.. unreadable, .. notUsable is null ? [] : new[] { notUsable }];
            if (lab is null)
            {
                findings.Add(LabSnapshotSource.Unreadable(cache, problem ?? "it is damaged"));
            }

            if (!System.IO.File.Exists(file))
            {
                findings.Add(new Finding("file-missing", "FILE", "There is no such file.", file, "Name the file to import."));
            }

            if (findings.Count == 0)
            {
                (ServiceSettings settings, IReadOnlyList<Finding> wrong) = SettingsReader.Read(configuration!, dataPath, "import");
                findings.AddRange(wrong);
                if (findings.Count == 0)
                {
                    return await ImportAsync(parsed, file, lab!, settings, dataPath, cancellationToken);
                }
            }

            FindingPrinter.Write(error, findings);
            return ExitCode.BadInput;
        }
    }

    private static async Task<int> ImportAsync(
        ParseResult parsed, string file, LabSnapshotSource lab, ServiceSettings settings, string dataPath, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        ReadingImporter importer = new(lab, settings.Intake, TimeProvider.System);
        ImportOrder order = OrderOf(parsed);
        string marks = Path.Combine(dataPath, "imports");
        int shown = 0;
        using ProgressLine progress = new(error);
        void Report(ImportTotals totals, IReadOnlyList<RefusedRow> refused)
        {
            foreach (RefusedRow row in refused.Take(Math.Max(0, MostShown - shown)))
            {
                FindingPrinter.Write(error, row.Findings);
            }

            shown += refused.Count;
            progress.Report(string.Create(CultureInfo.InvariantCulture, $"line {totals.Line:N0}, readings"), totals.Readings);
        }

        ImportResult result;
        try
        {
            result = parsed.GetValue(DryRun) ? await importer.LookAsync(file, order, Report, cancellationToken)
                : parsed.GetValue(Broker) is { } broker ? await importer.ThroughBrokerAsync(file, order, BrokerOf(parsed, broker, settings.Intake.SecretsDirectory), marks, Report, cancellationToken)
                : await IntoStoreAsync(importer, file, order, settings, marks, Report, cancellationToken);
        }
        catch (OperationCanceledException) when (cancellationToken.IsCancellationRequested)
        {
            await error.WriteLineAsync("Stopped. The same command goes on where this one was.");
            return ExitCode.Failure;
        }
        catch (Exception failure) when (failure is IOException or UnauthorizedAccessException or StoreUnavailableException or MQTTnet.Exceptions.MqttCommunicationException or MQTTnet.Exceptions.MqttClientNotConnectedException or MQTTnet.Adapter.MqttConnectingFailedException)
        {
            FindingPrinter.Write(error, [new Finding("import-stopped", "FILE", failure.Message, null, "Mend it and run the same command again: it goes on where this one was.")]);
            return ExitCode.Failure;
        }

        return Finish(parsed, result, shown);
    }

    private static async Task<ImportResult> IntoStoreAsync(
        ReadingImporter importer, string file, ImportOrder order, ServiceSettings settings, string marks, Action<ImportTotals, IReadOnlyList<RefusedRow>> report, CancellationToken cancellationToken)
    {
        HostApplicationBuilder builder = Host.CreateEmptyApplicationBuilder(new HostApplicationBuilderSettings());
        builder.Services.AddLogging();
        builder.Services.AddLabWatchReadings(settings.Readings);
        using IHost host = builder.Build();
        await host.StartAsync(cancellationToken);
        try
        {
            return await importer.IntoStoreAsync(
                file, order, host.Services.GetRequiredService<IReadingStore>(), host.Services.GetRequiredService<IQuarantine>(), marks, report, cancellationToken);
        }
        finally
        {
            await host.StopAsync(CancellationToken.None);
        }
    }

    private static int Finish(ParseResult parsed, ImportResult result, int refused)
    {
        if (result.Totals is not { } totals)
        {
            FindingPrinter.Write(parsed.InvocationConfiguration.Error, result.Findings);
            return ExitCode.BadInput;
        }

        TextWriter output = parsed.InvocationConfiguration.Output;
        if (result.FromLine > 0)
        {
            output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"Went on after line {result.FromLine}, where the last import was cut off."));
        }

        string what = totals.Stored is { } stored
            ? string.Create(CultureInfo.InvariantCulture, $"{stored} readings stored, {totals.Duplicates} were there already, {totals.Conflicts} are in conflict with what is there and went to quarantine")
            : parsed.GetValue(DryRun)
                ? string.Create(CultureInfo.InvariantCulture, $"{totals.Readings} readings are good; nothing was changed")
                : string.Create(CultureInfo.InvariantCulture, $"{totals.Readings} readings published and acknowledged");
        output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{totals.Rows} rows: {what}; {totals.Refused} rows refused{(refused > MostShown ? $", of which the first {MostShown} are listed" : string.Empty)}."));
        return totals.Refused > 0 ? ExitCode.BadInput : ExitCode.Success;
    }

    private static ImportOrder OrderOf(ParseResult parsed) => new()
    {
        TimeColumn = parsed.GetValue(TimeColumn)!,
        TimeFormat = parsed.GetValue(TimeFormat)!,
        TimeZone = parsed.GetValue(TimeZone),
        Source = parsed.GetValue(Source),
        Columns = parsed.GetValue(Column) ?? [],
        ChannelColumn = parsed.GetValue(ChannelColumn),
        ValueColumn = parsed.GetValue(ValueColumn)!,
        UnitColumn = parsed.GetValue(UnitColumn),
        Delimiter = Separator(parsed.GetValue(Delimiter))!.Value,
        DecimalComma = parsed.GetValue(DecimalComma),
    };

    private static char? Separator(string? text) => text switch
    {
        "tab" or "\t" => '\t',
        { Length: 1 } when text[0] is not ('"' or '\r' or '\n') => text[0],
        _ => null,
    };

    private static MqttClientOptions BrokerOf(ParseResult parsed, string broker, string? secretsDirectory)
    {
        int colon = broker.LastIndexOf(':');
        bool hasPort = colon > 0 && int.TryParse(broker[(colon + 1)..], NumberStyles.None, CultureInfo.InvariantCulture, out _);
        ExternalBrokerOptions options = new()
        {
            Host = hasPort ? broker[..colon] : broker,
            Tls = parsed.GetValue(Tls),
            Authorities = parsed.GetValue(Authorities)?.FullName,
        };
        if (hasPort)
        {
            options = options with { Port = int.Parse(broker[(colon + 1)..], CultureInfo.InvariantCulture) };
        }

        string? password = parsed.GetValue(PasswordSecret) is { } name
            ? new NamedSecrets(secretsDirectory, Environment.GetEnvironmentVariable).Read(name) ?? throw new IOException($"There is no secret named {name}.")
            : null;
        return PublisherLink.Options(options, "labwatch-import-" + Guid.NewGuid().ToString("N"), parsed.GetValue(User), password);
    }
}
