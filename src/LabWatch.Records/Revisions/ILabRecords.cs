namespace LabWatch.Records.Revisions;

/// <summary>
/// The versioned records of what is configured: site, sources, instruments, stays, certificates, triple-point checks, limits and ways to
/// tell somebody. They are the only truth about it; a lab file is an import. Rows are only ever added.
/// </summary>
public interface ILabRecords
{
    /// <summary>The sites that have records.</summary>
    ValueTask<IReadOnlyList<string>> SitesAsync(CancellationToken cancellationToken);

    /// <summary>Number of a site's newest revision; 0 where there is none. Cheap enough to ask often.</summary>
    ValueTask<long> HeadAsync(string site, CancellationToken cancellationToken);

    /// <summary>All records of a site.</summary>
    ValueTask<LabRecordSet> ReadAsync(string site, CancellationToken cancellationToken);

    /// <summary>
    /// Imports a lab file: what it changes becomes revisions that supersede, in one transaction with the file itself. The file imported last,
    /// byte for byte, changes nothing: edits made since stay in force.
    /// </summary>
    ValueTask<LabImportOutcome> ImportAsync(LabImportOrder order, CancellationToken cancellationToken);

    /// <summary>Records the next revision of one record, where the whole site is still valid with it.</summary>
    ValueTask<RevisionOutcome> ReviseAsync(RevisionOrder order, CancellationToken cancellationToken);
}
