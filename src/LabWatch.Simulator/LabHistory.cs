using LabWatch.Lab.Time;

namespace LabWatch.Simulator;

/// <summary>What fixes a simulated lab for good.</summary>
/// <param name="Seed">Draws the hidden truth, the weather and all noise.</param>
/// <param name="DriftEpoch">The moment from which hidden drifts and ageing count.</param>
internal sealed record LabHistory(long Seed, Instant DriftEpoch)
{
    private const double SecondsPerYear = 365.25 * 86400;

    /// <summary>Years since the epoch.</summary>
    public double Years(long second) => (second - (DriftEpoch.Microseconds / Instant.MicrosecondsPerSecond)) / SecondsPerYear;
}
