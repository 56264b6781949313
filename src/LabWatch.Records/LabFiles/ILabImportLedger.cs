namespace LabWatch.Records.LabFiles;

/// <summary>The lab files that were imported, all of them, unchanged. <see cref="Revisions.ILabRecords"/> imports them.</summary>
public interface ILabImportLedger
{
    /// <summary>The latest import of a site; null before the first.</summary>
    ValueTask<LabImport?> LatestAsync(string site, CancellationToken cancellationToken);

    /// <summary>All imports of a site, oldest first.</summary>
    ValueTask<IReadOnlyList<LabImport>> ListAsync(string site, CancellationToken cancellationToken);
}
