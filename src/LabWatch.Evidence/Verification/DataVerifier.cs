using System.Data.Common;
using LabWatch.Evidence.Recording;
using LabWatch.Lab.Findings;
using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Audit;
using LabWatch.Records.Audit.Verification;

namespace LabWatch.Evidence.Verification;

/// <summary>
/// Verifies a data directory: the chain of the audit trail, every covered record, every sealed part of every source-hour. Opens for
/// reading alone, beside a running service or without one. Damaged bytes are findings, never exceptions.
/// </summary>
public sealed class DataVerifier
{
    private static readonly Dictionary<string, string> OtherTables = new(StringComparer.Ordinal) { [HourNote.Prefix] = "block" };

    private readonly VerifyRequest _request;
    private readonly bool _inUse;
    private readonly Action<string, long> _progress;
    private readonly TrailFindings _findings = new();
    private readonly SortedDictionary<string, long> _examined = new(StringComparer.Ordinal);
    private readonly Dictionary<int, HourFacts> _hours = [];
    private readonly HashSet<(string Before, string After)> _removals = [];
    private readonly List<string> _notes = [];
    private long _readings;

    private DataVerifier(VerifyRequest request, Action<string, long>? progress, bool inUse)
    {
        _inUse = inUse;
        _request = request;
        _progress = (table, count) =>
        {
            _examined[table] = count;
            progress?.Invoke(table, count);
        };
    }

    /// <summary>Verifies. Gives the report, or the findings that say why the directory cannot be verified at all.</summary>
    /// <param name="request">What to verify.</param>
    /// <param name="progress">Told of tables and the rows read in them so far; null for nobody.</param>
    public static (VerifyReport? Report, IReadOnlyList<Finding> BadInput) Run(VerifyRequest request, Action<string, long>? progress = null)
    {
        ArgumentNullException.ThrowIfNull(request);
        // A file without a write-ahead log is read as if nobody used it. Where a service wrote it meanwhile, what was found may be its doing.
        FileStates before = StatesOf(request);
        (VerifyReport? Report, IReadOnlyList<Finding> BadInput) first = new DataVerifier(request, progress, inUse: false).Run();
        bool mayBeTorn = (before.Records.IsAtRest || before.Readings.IsAtRest) && before != StatesOf(request);
        return mayBeTorn ? new DataVerifier(request, progress, inUse: true).Run() : first;
    }

    private static FileStates StatesOf(VerifyRequest request) => new(
        SqliteReadOnly.StateOf(request.Records.FilePath), SqliteReadOnly.StateOf(Path.Combine(request.DataDirectory, SqliteReadingStore.FileName)));

    private (VerifyReport? Report, IReadOnlyList<Finding> BadInput) Run()
    {
        IReadOnlyDictionary<string, AuditHead> heads = new Dictionary<string, AuditHead>(StringComparer.Ordinal);
        // Before the database: beside a running service the chain goes on meanwhile, and must hold what was noted earlier.
        IReadOnlyDictionary<string, AuditHead>? kept = TrailHeadFile.Read(_request.DataDirectory);
        try
        {
            using RecordsSnapshot records = RecordsSnapshot.Open(_request.Records, _inUse);
            TrailVerifier verifier = new(records, _findings);
            if (verifier.Unfit() is { } unfit)
            {
                return (null, [new Finding("schema-differs", "--data", unfit, _request.DataDirectory, "Use the version of LabWatch that the records belong to.")]);
            }

            heads = verifier.ReadTrail(TakeEntry, _progress);
            CheckHeads(verifier, kept);
            verifier.CheckTables(_progress);
            CheckHours(verifier);
            if (verifier.CheckUnclaimed(OtherTables, NameOf) is > 0 and long unknown)
            {
                _notes.Add(FormattableString.Invariant($"{unknown} entries tell of kinds of record that this version does not know; those records were not checked."));
            }
        }
        catch (UnreadableException exception)
        {
            _findings.Add(Unreadable.Table(RecordsOptions.FileName, exception.Message));
        }

        _notes.Add("Readings of hours that are not sealed yet are not covered.");
        return (new VerifyReport(_findings, heads, _examined, _readings, _notes), []);
    }

    private string NameOf(int place, string subject) =>
        _hours.TryGetValue(place, out HourFacts facts) ? HourCheck.NameOf(subject, facts.Seal) : subject;

    private void TakeEntry(int place, ReadOnlySpan<byte> subject, ReadOnlySpan<byte> content)
    {
        if (subject.StartsWith("hour/"u8) && HourFacts.Read(content) is { } facts)
        {
            _hours[place] = facts;
        }
        else if (subject.StartsWith("removal/"u8))
        {
            _removals.UnionWith(RemovalNote.Read(content));
        }
    }

    private void CheckHeads(TrailVerifier verifier, IReadOnlyDictionary<string, AuditHead>? kept)
    {
        foreach ((string? site, AuditHead head) in _request.Noted)
        {
            verifier.CheckHead(site, head, "the head that was given");
        }

        if (kept is null)
        {
            _findings.Add(new TrailFinding(
                TrailCodes.HeadFileUnreadable, TrailHeadFile.FileName, string.Empty, null, "The file of the noted ends is not what the service writes.",
                "It was altered or damaged; compare the chain with a head that was kept elsewhere (--head)."));
            return;
        }

        if (kept.Count == 0 && verifier.Facts.Entries.Length > 0)
        {
            _notes.Add($"{TrailHeadFile.FileName} is not there: a chain that was cut at its end shows only against a head that was kept elsewhere (--head).");
        }

        foreach ((string site, AuditHead head) in kept)
        {
            verifier.CheckHead(site, head, TrailHeadFile.FileName);
        }
    }

    private void CheckHours(TrailVerifier verifier)
    {
        string path = Path.Combine(_request.DataDirectory, SqliteReadingStore.FileName);
        if (_request.Readings?.Engine is ReadingsEngine.InfluxDb)
        {
            PassOver(verifier);
            return;
        }

        bool isFile = _request.Readings is not { Engine: ReadingsEngine.PostgreSql };
        if (isFile && !File.Exists(path) && _hours.Count == 0)
        {
            _notes.Add("There are no readings in this directory.");
            return;
        }

        try
        {
            using ISealedParts file = isFile ? SealedFile.Open(path, _inUse) : OpenSchema(_request.Readings!);
            HourCheck check = new(file, verifier.Facts, _hours, _removals, _findings);
            check.Run(count => _progress("block", count));
            _readings = check.Readings;
            if (check.Thinned > 0)
            {
                _notes.Add(FormattableString.Invariant($"Readings of {check.Thinned} sealed parts were removed by the rules of retention, and the trail says so; what is left of them is as recorded, their summaries cannot be compared any more."));
            }

            if (check.Pending > 0)
            {
                _notes.Add(FormattableString.Invariant($"{check.Pending} sealed parts are newer than the trail; the service enters them within seconds when it runs, and until then they are not covered."));
            }
        }
        catch (UnreadableException exception)
        {
            _findings.Add(Unreadable.Table(isFile ? SqliteReadingStore.FileName : "readings in PostgreSQL", exception.Message));
        }
    }

    private static SealedSchema OpenSchema(ReadingsOptions options)
    {
        try
        {
            return new SealedSchema(PostgreSqlReadingStore.Dialect(options).OpenReader());
        }
        catch (Exception exception) when (exception is DbException or StoreUnavailableException or TimeoutException)
        {
            throw new UnreadableException(exception.Message);
        }
    }

    /// <summary>Points of InfluxDB are not bytes that can be read beside the server; the entries about them are part of the chain that was checked.</summary>
    private void PassOver(TrailVerifier verifier)
    {
        foreach (int place in _hours.Keys)
        {
            verifier.Facts.Entries[place].IsClaimed = true;
        }

        _notes.Add(FormattableString.Invariant($"The readings lie in InfluxDB: {_hours.Count} entries about sealed hours were not compared with it."));
    }

    private readonly record struct FileStates((bool IsAtRest, long Length, long Written) Records, (bool IsAtRest, long Length, long Written) Readings);
}
