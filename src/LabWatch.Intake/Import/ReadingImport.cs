using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Import;

/// <summary>Brings readings of the past in from delimited text, by the rules of the intake. It may be cut off anywhere and run again.</summary>
internal sealed class ReadingImport(ILabSnapshotSource lab, IntakeOptions options, ImportOrder order, TimeProvider clock)
{
    /// <summary>Readings after which they are put away; a row is never split.</summary>
    private const int BatchReadings = 20_000;

    /// <summary>Readings in one pack at most, well below the limits of the intake.</summary>
    private const int PackReadings = 2_000;

    private const int BatchRefused = 1_000;
    private readonly Dictionary<SourceKey, List<Reading>> _batch = [];
    private readonly List<RefusedRow> _refused = [];
    private ImportTotals _totals = new(0, 0, 0, null, null, null, 0);

    /// <summary>Reads the file to its end, or until cancelled, and puts what it holds into the sink.</summary>
    /// <param name="text">The file.</param>
    /// <param name="sink">Where readings go.</param>
    /// <param name="fromLine">Line up to which all was done before.</param>
    /// <param name="report">Gets what was refused and how far it has come, after each batch.</param>
    /// <param name="cancellationToken">Ends it between two batches.</param>
    /// <returns>What was done, or the findings why nothing could be.</returns>
    public async Task<(ImportTotals? Totals, IReadOnlyList<Finding> Findings)> RunAsync(
        TextReader text, IImportSink sink, long fromLine, Action<ImportTotals, IReadOnlyList<RefusedRow>> report, CancellationToken cancellationToken)
    {
        CsvReader reader = new(text, order.Delimiter);
        if (TryReadRow(reader, out _) is not { } header)
        {
            return (null, [new Finding("no-header", "FILE", "The file has no header.", null, "The first row must name the columns.")]);
        }

        (ImportTimes? times, Finding? zone) = ImportTimes.Create(order.TimeFormat, order.TimeZone);
        (ImportColumns? columns, IReadOnlyList<Finding> findings) = ImportColumns.Find(header, order, lab.Current);
        if (times is null || columns is null)
        {
            return (null, [.. findings, .. zone is null ? [] : new[] { zone }]);
        }

        // A service that runs judges by its own rule; into the store readings of any age may go.
        ReadingTimeRule rule = sink is BrokerSink ? options.Times : options.Times with { LateLimit = null };
        RowReader rows = new(columns, order, times, new PayloadDecoder(lab, options.Root, options.Payload, rule, new MappingTable([])), lab.Current, options.Root);
        int waiting = 0;
        while (true)
        {
            IReadOnlyList<string>? fields = TryReadRow(reader, out RefusedRow? broken);
            if (fields is null && broken is null)
            {
                break;
            }

            if (reader.Line > fromLine)
            {
                RefusedRow? refused = broken ?? rows.Read(fields!, reader.Line, Instant.Now(clock), (source, readings) => waiting += Add(source, readings));
                if (refused is not null)
                {
                    _refused.Add(refused);
                }
            }

            _totals = _totals with { Line = reader.Line, Rows = _totals.Rows + 1 };
            if (waiting >= BatchReadings || _refused.Count >= BatchRefused)
            {
                waiting = 0;
                await PutAsync(sink, report, cancellationToken);
                cancellationToken.ThrowIfCancellationRequested();
            }
        }

        await PutAsync(sink, report, cancellationToken);
        return (_totals, []);
    }

    private static IReadOnlyList<string>? TryReadRow(CsvReader reader, out RefusedRow? broken)
    {
        broken = null;
        try
        {
            return reader.Read();
        }
        catch (InvalidDataException exception)
        {
            broken = new RefusedRow(reader.Line, string.Empty, [new Finding("malformed-row", FormattableString.Invariant($"line {reader.Line}"), exception.Message, null, "Mend the quotes of the row (RFC 4180).")]);
            return null;
        }
    }

    private int Add(SourceKey source, IReadOnlyList<Reading> readings)
    {
        if (!_batch.TryGetValue(source, out List<Reading>? list))
        {
            _batch[source] = list = [];
        }

        list.AddRange(readings);
        return readings.Count;
    }

    private async Task PutAsync(IImportSink sink, Action<ImportTotals, IReadOnlyList<RefusedRow>> report, CancellationToken cancellationToken)
    {
        Instant arrival = Instant.Now(clock);
        ImportPack[] packs =
        [
            .. _batch.SelectMany(source => source.Value.Chunk(PackReadings).Select(readings => new ImportPack(
                $"{options.Root}/{source.Key.Site}/{source.Key.Source}", SenmlText.Pack(readings), new ReadingPack(source.Key, arrival, readings)))),
        ];
        RefusedRow[] refused = [.. _refused];
        (int Stored, int Duplicates, int Conflicts)? put = await sink.PutAsync(packs, refused, cancellationToken);
        _totals = _totals with
        {
            Readings = _totals.Readings + _batch.Values.Sum(readings => readings.Count),
            Stored = put is null ? _totals.Stored : (_totals.Stored ?? 0) + put.Value.Stored,
            Duplicates = put is null ? _totals.Duplicates : (_totals.Duplicates ?? 0) + put.Value.Duplicates,
            Conflicts = put is null ? _totals.Conflicts : (_totals.Conflicts ?? 0) + put.Value.Conflicts,
            Refused = _totals.Refused + refused.Length,
        };
        _batch.Clear();
        _refused.Clear();
        report(_totals, refused);
    }
}
