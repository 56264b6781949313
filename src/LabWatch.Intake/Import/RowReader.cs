using System.Buffers;
using System.Globalization;
using System.Text;
using System.Text.Json;
using LabWatch.Intake.Payloads;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Import;

/// <summary>
/// Turns one row into readings. Each source's part of a row is written as the SenML record that a device would send and goes through the
/// decoder of the intake, so that an import is judged by the same rules as a message.
/// </summary>
internal sealed class RowReader(ImportColumns columns, ImportOrder order, ImportTimes times, PayloadDecoder decoder, LabSnapshot lab, string root)
{
    private readonly ArrayBufferWriter<byte> _json = new();
    private readonly List<(ImportTarget Target, string Text, int Column)> _values = [];

    /// <summary>Reads a row: good readings are added, what is wrong is returned; null where nothing is.</summary>
    public RefusedRow? Read(IReadOnlyList<string> fields, long line, Instant arrival, Action<SourceKey, IReadOnlyList<Reading>> add)
    {
        List<Finding> findings = [];
        if (fields.Count != columns.Count)
        {
            findings.Add(At(line, "wrong-columns", $"The row has {fields.Count} fields, the header {columns.Count}.", null, "Mend the row; a field with a delimiter must be quoted."));
        }
        else if (times.Read(fields[columns.Time].Trim(), out Instant time) is { } reason)
        {
            findings.Add(At(line, reason, Explain(reason), fields[columns.Time], "Give the time with its offset, or mend it."));
        }
        else
        {
            Collect(fields, line, findings);
            foreach (IGrouping<SourceKey, (ImportTarget Target, string Text, int Column)> part in _values.GroupBy(value => value.Target.Source))
            {
                Decode(part.Key, [.. part], time, line, arrival, findings, add);
            }
        }

        return findings.Count == 0 ? null : new RefusedRow(line, string.Join(order.Delimiter, fields), findings);
    }

    private void Collect(IReadOnlyList<string> fields, long line, List<Finding> findings)
    {
        _values.Clear();
        if (columns.Long is not { } at)
        {
            // An empty field of the wide form is no reading: loggers leave it where a channel was not read.
            _values.AddRange(columns.Wide.Where(column => fields[column.Column].Trim().Length > 0).Select(column => (column.Target, fields[column.Column].Trim(), column.Column)));
            return;
        }

        string unit = at.Unit < 0 ? string.Empty : fields[at.Unit].Trim();
        string name = fields[at.Channel].Trim();
        if (ImportColumns.Resolve(name, order.Source, lab) is { } target)
        {
            _values.Add((unit.Length > 0 ? target with { Unit = unit } : target, fields[at.Value].Trim(), at.Value));
        }
        else
        {
            findings.Add(At(line, IntakeCode.UnknownChannel, "The lab file has no such channel.", name, "Name it SOURCE/CHANNEL, or CHANNEL with --source; or add it to the lab file."));
        }
    }

    private void Decode(
        SourceKey source, (ImportTarget Target, string Text, int Column)[] values, Instant time, long line, Instant arrival, List<Finding> findings, Action<SourceKey, IReadOnlyList<Reading>> add)
    {
        _json.ResetWrittenCount();
        using (Utf8JsonWriter writer = new(_json))
        {
            writer.WriteStartArray();
            foreach ((ImportTarget target, string text, int column) in values)
            {
                string number = order.DecimalComma ? text.Replace(',', '.') : text;
                if (!BareNumberDecoder.TryParse(Encoding.UTF8.GetBytes(number), out double value) || double.IsInfinity(value))
                {
                    findings.Add(At(line, IntakeCode.ValueNotNumber, $"The field of {target.Channel} (column {column + 1}) is no number.", text, "Mend the field, or leave it empty."));
                    continue;
                }

                SenmlText.Write(writer, target.Channel, time, value, target.Unit);
            }

            writer.WriteEndArray();
        }

        DecodedMessage decoded = decoder.Decode($"{root}/{source.Site}/{source.Source}", new ReadOnlySequence<byte>(_json.WrittenMemory), false, arrival);
        findings.AddRange(decoded.Findings.Where(finding => finding.Code != IntakeCode.MoreFindings).Select(finding => finding with { Where = string.Create(CultureInfo.InvariantCulture, $"line {line}") }));
        if (decoded.Pack is { } pack)
        {
            add(source, pack.Readings);
        }
    }

    private static Finding At(long line, string code, string message, string? value, string cure) =>
        new(code, string.Create(CultureInfo.InvariantCulture, $"line {line}"), message, Finding.Quote(value), cure);

    private static string Explain(string reason) => reason switch
    {
        ImportTimes.Ambiguous => "Clocks were put back: this time of day happened twice.",
        ImportTimes.Missing => "Clocks were put forward: this time of day did not happen.",
        ImportTimes.ZoneNeeded => "The time has no offset, and no time zone is stated.",
        _ => "This is no time in the stated format.",
    };
}
