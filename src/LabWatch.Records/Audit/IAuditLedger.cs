namespace LabWatch.Records.Audit;

/// <summary>
/// The audit trail: who did what, when. Each site has a chain of its own in which every entry holds the digest of the one before. Entries
/// about a record stand in the transaction of the record; those that belong to none are appended here.
/// </summary>
public interface IAuditLedger
{
    /// <summary>Appends an entry.</summary>
    ValueTask AppendAsync(AuditNote note, CancellationToken cancellationToken) => AppendAsync([note], null, cancellationToken);

    /// <summary>Appends entries, and moves the position of a reader, in one transaction.</summary>
    /// <param name="notes">The entries, in order.</param>
    /// <param name="reader">A reader and how far it has come; null where there is none.</param>
    /// <param name="cancellationToken">Cancels the write.</param>
    ValueTask AppendAsync(IReadOnlyList<AuditNote> notes, (string Reader, long Position)? reader, CancellationToken cancellationToken);

    /// <summary>Entries of a site, newest first, one page at a time.</summary>
    ValueTask<AuditPage> ListAsync(AuditQuery query, CancellationToken cancellationToken);

    /// <summary>The end of a site's chain; null while it is empty.</summary>
    ValueTask<AuditHead?> HeadAsync(string site, CancellationToken cancellationToken);
}
