namespace LabWatch.Intake.Import;

/// <summary>For a dry run: nothing is kept.</summary>
internal sealed class NoSink : IImportSink
{
    /// <inheritdoc/>
    public Task<(int Stored, int Duplicates, int Conflicts)?> PutAsync(IReadOnlyList<ImportPack> packs, IReadOnlyList<RefusedRow> refused, CancellationToken cancellationToken) =>
        Task.FromResult<(int, int, int)?>(null);
}
