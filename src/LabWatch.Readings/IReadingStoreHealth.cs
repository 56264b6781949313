using LabWatch.Lab.Findings;

namespace LabWatch.Readings;

/// <summary>How the store is.</summary>
public interface IReadingStoreHealth
{
    /// <summary>What was found damaged or missing and is set aside: empty in a sound store.</summary>
    IReadOnlyList<Finding> Findings { get; }

    /// <summary>Why the store took no readings at its last attempt; null while it takes them. It is tried again every few seconds.</summary>
    string? Trouble => null;

    /// <summary>Opens the store where it is not open, so that a fault shows at once. Throws <see cref="StoreUnavailableException"/>.</summary>
    ValueTask OpenAsync(CancellationToken cancellationToken);
}
