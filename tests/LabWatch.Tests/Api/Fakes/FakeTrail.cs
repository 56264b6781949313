using LabWatch.Records.Audit;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>A trail in memory, without digests.</summary>
internal sealed class FakeTrail : IAuditLedger
{
    private readonly List<AuditEntry> _entries = [];

    public AuditQuery? LastQuery { get; private set; }

    /// <summary>Position that the next pages tell to go on from.</summary>
    public long? Next { get; set; }

    public IReadOnlyList<AuditEntry> Entries => _entries;

    public ValueTask AppendAsync(IReadOnlyList<AuditNote> notes, (string Reader, long Position)? reader, CancellationToken cancellationToken)
    {
        foreach (AuditNote note in notes)
        {
            _entries.Add(new AuditEntry(
                note.Site, _entries.Count + 1, note.At, note.Actor, note.Action, note.Subject, note.Content, note.RecordDigest, new string('0', 64), new string('1', 64)));
        }

        return ValueTask.CompletedTask;
    }

    public ValueTask<AuditPage> ListAsync(AuditQuery query, CancellationToken cancellationToken)
    {
        LastQuery = query;
        AuditHead? head = _entries.Count == 0 ? null : new AuditHead(_entries[^1].Sequence, _entries[^1].Digest);
        return ValueTask.FromResult(new AuditPage([.. _entries.AsEnumerable().Reverse()], Next, head));
    }

    public ValueTask<AuditHead?> HeadAsync(string site, CancellationToken cancellationToken) =>
        ValueTask.FromResult(_entries.Count == 0 ? null : new AuditHead(_entries[^1].Sequence, _entries[^1].Digest));
}
