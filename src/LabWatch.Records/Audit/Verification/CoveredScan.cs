using System.Buffers;
using System.Collections.Immutable;
using System.Runtime.Intrinsics;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Records.Audit.Covered;

namespace LabWatch.Records.Audit.Verification;

/// <summary>Reads every row of a covered table once: each must be as its entry says, and have one.</summary>
internal sealed class CoveredScan
{
    private const string Altered = "The row was altered after it was recorded, by a person or by a fault of the disk.";

    private readonly RecordsSnapshot _records;
    private readonly TrailFacts _facts;
    private readonly TrailFindings _findings;
    private readonly CoveredTable _table;
    private readonly ImmutableArray<CoveredColumn> _columns;
    private readonly string _name;
    private readonly int _site;
    private readonly (byte[] Text, int Column)[] _subjectParts;
    private readonly ArrayBufferWriter<byte> _canonical = new(4096);
    private readonly ArrayBufferWriter<byte> _subject = new(128);

    public CoveredScan(RecordsSnapshot records, TrailFacts facts, TrailFindings findings, CoveredTable table)
    {
        (_records, _facts, _findings, _table) = (records, facts, findings, table);
        _columns = CoveredColumns.Of(records.Model, table);
        _name = CoveredColumns.TableName(records.Model, table);
        _site = Place("site");
        _subjectParts = [.. table.Parts.Select(part => (Encoding.UTF8.GetBytes(part.Text), part.IsColumn ? Place(part.Text) : -1))];
    }

    /// <summary>Reads them all.</summary>
    public void Run(Action<long> progress)
    {
        string columns = string.Join(", ", _columns.Select(column => $"\"{column.Name}\""));
        long count = 0;
        string? damage = _records.Walk(columns, _name, scan =>
        {
            Take(scan);
            if (++count % 4_096 == 0)
            {
                progress(count);
            }
        });
        if (damage is not null)
        {
            _findings.Add(Unreadable.Table(_name, damage));
        }

        progress(count);
    }

    private int Place(string column) => _columns.IndexOf(_columns.First(one => one.Name == column));

    private void Take(TableScan scan)
    {
        _canonical.ResetWrittenCount();
        RecordWriter record = new(_canonical);
        for (int i = 0; i < _columns.Length; i++)
        {
            CellWriter.Write(ref record, _columns[i], scan, i);
        }

        record.End();
        Span<byte> digest = stackalloc byte[SHA256.HashSizeInBytes];
        SHA256.HashData(_canonical.WrittenSpan, digest);
        MakeSubject(scan);
        int place = scan.Kind(_site) is CellKind.Text ? _facts.Find(scan.Bytes(_site), _subject.WrittenSpan) : -1;
        if (place < 0)
        {
            Report(TrailCodes.RowAdded, null, "No entry of the trail tells of the row.", "The row was added beside the service, or the columns that name it were altered.");
            return;
        }

        ref EntryFacts entry = ref _facts.Entries[place];
        if (entry.IsClaimed)
        {
            Report(TrailCodes.RowAdded, null, "The row is there a second time.", "The row was added beside the service.");
        }
        else if (entry.Record != Vector256.Create<byte>(digest))
        {
            string? field = OddField(scan) ?? ContentFields.Differing(_records, _facts.Sites[entry.Site], entry.Sequence, _columns, scan);
            Report(TrailCodes.RowAltered, field, FormattableString.Invariant($"The row does not have the digest that entry {entry.Sequence} recorded."), Altered);
        }

        entry.IsClaimed = true;
    }

    private void MakeSubject(TableScan scan)
    {
        _subject.ResetWrittenCount();
        foreach ((byte[] text, int column) in _subjectParts)
        {
            if (column < 0)
            {
                _subject.Write(text);
            }
            else
            {
                CellWriter.WriteSubject(_subject, _columns[column], scan, column);
            }
        }
    }

    /// <summary>A column that holds a value of another kind than it can have; null where there is none.</summary>
    private string? OddField(TableScan scan)
    {
        for (int i = 0; i < _columns.Length; i++)
        {
            bool isRight = (_columns[i].Form, scan.Kind(i)) is (_, CellKind.Null)
                or (CoveredForm.Text or CoveredForm.Uuid, CellKind.Text) or (CoveredForm.Uuid, CellKind.Uuid) or (CoveredForm.Whole or CoveredForm.Truth, CellKind.Whole)
                or (CoveredForm.Truth, CellKind.Truth) or (CoveredForm.Real, CellKind.Real) or (CoveredForm.Bytes, CellKind.Bytes);
            if (!isRight)
            {
                return _columns[i].Name;
            }
        }

        return null;
    }

    private void Report(string code, string? field, string message, string meaning) =>
        _findings.Add(new TrailFinding(code, _name, Encoding.UTF8.GetString(_subject.WrittenSpan), field, message, meaning));
}
