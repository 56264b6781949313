namespace LabWatch.Intake.Import;

/// <summary>Where an import puts what it reads.</summary>
internal interface IImportSink
{
    /// <summary>Makes packs durable and keeps the rows that were refused; returns how many were new, there already, in conflict, where that is known.</summary>
    Task<(int Stored, int Duplicates, int Conflicts)?> PutAsync(IReadOnlyList<ImportPack> packs, IReadOnlyList<RefusedRow> refused, CancellationToken cancellationToken);
}
