namespace LabWatch.Readings;

/// <summary>Compares what is sealed with its digests.</summary>
public interface IReadingIntegrity
{
    /// <summary>Compares the next sealed parts. What differs becomes a finding of the store's health; nothing is changed.</summary>
    /// <param name="afterSeal">Number of the seal to go on after; 0 for the first.</param>
    /// <param name="count">Most parts to compare.</param>
    /// <param name="cancellationToken">Ends the wait.</param>
    ValueTask<IntegrityBatch> CheckSealedAsync(long afterSeal, int count, CancellationToken cancellationToken);
}
