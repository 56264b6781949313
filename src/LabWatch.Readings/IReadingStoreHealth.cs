using LabWatch.Lab.Findings;

namespace LabWatch.Readings;

/// <summary>How the store is.</summary>
public interface IReadingStoreHealth
{
    /// <summary>What was found damaged or missing and is set aside: empty in a sound store.</summary>
    IReadOnlyList<Finding> Findings { get; }

    /// <summary>Opens the store where it is not open, so that a fault shows at once. Throws <see cref="StoreUnavailableException"/>.</summary>
    ValueTask OpenAsync(CancellationToken cancellationToken);
}
