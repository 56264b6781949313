namespace LabWatch.Readings;

/// <summary>Seals hours of a store; called by the background sealer, and by tools before a backup.</summary>
public interface IReadingSealer
{
    /// <summary>Whether so much is unsealed that sealing should not wait for its next turn.</summary>
    bool NeedsSealing { get; }

    /// <summary>Seals the hours that are over and quiet, and more where memory or journal are at their limit; gives how many parts were sealed.</summary>
    Task<int> SealDueAsync(CancellationToken cancellationToken);

    /// <summary>Seals all that is unsealed, running hours too: readings that come for them later make supplements.</summary>
    Task<int> SealEverythingAsync(CancellationToken cancellationToken);
}
