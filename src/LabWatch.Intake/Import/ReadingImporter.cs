using System.Text;
using LabWatch.Intake.Options;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Readings;
using LabWatch.Readings.Quarantine;
using MQTTnet;

namespace LabWatch.Intake.Import;

/// <summary>Brings a file of delimited text in: into the store of a service that is stopped, or by MQTT to one that runs, or nowhere to see what would happen.</summary>
/// <param name="lab">The lab file in force.</param>
/// <param name="options">The options of the intake: roots, limits, rules of time.</param>
/// <param name="clock">The clock.</param>
public sealed class ReadingImporter(ILabSnapshotSource lab, IntakeOptions options, TimeProvider clock)
{
    /// <summary>Only looks: what would be refused, and how many readings there are.</summary>
    public async Task<ImportResult> LookAsync(string file, ImportOrder order, Action<ImportTotals, IReadOnlyList<RefusedRow>> report, CancellationToken cancellationToken) =>
        await RunAsync(file, order, new NoSink(), null, report, cancellationToken);

    /// <summary>Puts readings into the store, and what was refused into quarantine with its line. Goes on where an import that was cut off had come.</summary>
    /// <param name="file">Path of the file.</param>
    /// <param name="order">How to read it.</param>
    /// <param name="store">The store; nobody else appends to it meanwhile.</param>
    /// <param name="quarantine">The quarantine.</param>
    /// <param name="markDirectory">Where to note how far it has come.</param>
    /// <param name="report">Gets what was refused and how far it has come, after each batch.</param>
    /// <param name="cancellationToken">Ends it between two batches.</param>
    public async Task<ImportResult> IntoStoreAsync(
        string file,
        ImportOrder order,
        IReadingStore store,
        IQuarantine quarantine,
        string markDirectory,
        Action<ImportTotals, IReadOnlyList<RefusedRow>> report,
        CancellationToken cancellationToken) =>
        await RunAsync(file, order, new StoreSink(store, quarantine, options.Root, Path.GetFileName(file), clock), markDirectory, report, cancellationToken);

    /// <summary>
    /// Publishes readings as a device would. Throws <see cref="IOException"/> where the broker does not take them, and what the client throws where it cannot
    /// be reached.
    /// </summary>
    public async Task<ImportResult> ThroughBrokerAsync(
        string file, ImportOrder order, MqttClientOptions broker, string markDirectory, Action<ImportTotals, IReadOnlyList<RefusedRow>> report, CancellationToken cancellationToken)
    {
        using IMqttClient client = new MqttClientFactory().CreateMqttClient();
        MqttClientConnectResult answer = await client.ConnectAsync(broker, cancellationToken);
        if (answer.ResultCode != MqttClientConnectResultCode.Success)
        {
            throw new IOException($"The broker refused the connection: {answer.ResultCode} {answer.ReasonString}".TrimEnd());
        }

        ImportResult result = await RunAsync(file, order, new BrokerSink(client, broker, clock), markDirectory, report, cancellationToken);
        await client.DisconnectAsync(new MqttClientDisconnectOptions(), cancellationToken);
        return result;
    }

    private async Task<ImportResult> RunAsync(
        string file, ImportOrder order, IImportSink sink, string? markDirectory, Action<ImportTotals, IReadOnlyList<RefusedRow>> report, CancellationToken cancellationToken)
    {
        using FileStream stream = new(file, FileMode.Open, FileAccess.Read, FileShare.Read, 1 << 16, FileOptions.SequentialScan);
        ImportMark? mark = markDirectory is null ? null : ImportMark.Of(markDirectory, stream, order);
        stream.Position = 0;
        using StreamReader text = new(stream, new UTF8Encoding(false, throwOnInvalidBytes: false), detectEncodingFromByteOrderMarks: true);
        long from = mark?.Read() ?? 0;
        (ImportTotals? totals, IReadOnlyList<Finding> findings) = await new ReadingImport(lab, options, order, clock).RunAsync(
            text,
            sink,
            from,
            (so, refused) =>
            {
                mark?.Write(so.Line);
                report(so, refused);
            },
            cancellationToken);
        if (totals is not null)
        {
            mark?.Remove();
        }

        return new ImportResult(totals, from, findings);
    }
}
