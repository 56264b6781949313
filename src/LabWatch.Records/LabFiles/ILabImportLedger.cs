using LabWatch.Lab.Time;

namespace LabWatch.Records.LabFiles;

/// <summary>The lab files that were imported, all of them, unchanged.</summary>
public interface ILabImportLedger
{
    /// <summary>
    /// Records a lab file. Where it is byte for byte the site's latest import, nothing is written and that one is returned.
    /// </summary>
    ValueTask<LabImport> RecordAsync(string site, string document, Instant at, string by, CancellationToken cancellationToken);

    /// <summary>The latest import of a site; null before the first.</summary>
    ValueTask<LabImport?> LatestAsync(string site, CancellationToken cancellationToken);

    /// <summary>All imports of a site, oldest first.</summary>
    ValueTask<IReadOnlyList<LabImport>> ListAsync(string site, CancellationToken cancellationToken);
}
