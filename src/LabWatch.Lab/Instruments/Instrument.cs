using LabWatch.Lab.Time;

namespace LabWatch.Lab.Instruments;

/// <summary>A measuring instrument with a serial number. Its certificates belong to it, not to the channel it is installed in.</summary>
/// <param name="Id">Id in the site (a slug).</param>
/// <param name="SerialNumber">Serial number as engraved.</param>
/// <param name="Description">What it is, in words.</param>
public sealed record Instrument(string Id, string SerialNumber, string Description)
{
    /// <summary>Longest time between two measurements in a triple-point cell; null where none is set.</summary>
    public TimeSpan? TriplePointInterval { get; init; }

    /// <summary>First instant from which the instrument is no more one of the site's; null while it is.</summary>
    public Instant? WithdrawnFrom { get; init; }
}
