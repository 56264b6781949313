using LabWatch.Lab.Sources;

namespace LabWatch.Readings;

/// <summary>How long raw readings of one quantity must be kept.</summary>
public sealed record RetentionRule
{
    /// <summary>The quantity; null for all channels that no other rule names, also those that the lab file does not have any more.</summary>
    public ChannelQuantity? Quantity { get; init; }

    /// <summary>Years of 365.25 days, 1 to 200.</summary>
    public int Years { get; init; }
}
