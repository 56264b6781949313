using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>How a channel's readings of one window are. Counts are readings, except where it says otherwise.</summary>
/// <param name="Channel">The channel.</param>
/// <param name="Expected">Readings that its promised interval makes in the window, at least 1.</param>
/// <param name="Received">Readings in the window.</param>
/// <param name="Missing">Promised readings that are not there, 0 to <paramref name="Expected"/>.</param>
internal sealed record ChannelHealth(Channel Channel, int Expected, int Received, int Missing)
{
    /// <summary>The longest stretch without a reading; zero where none is missing.</summary>
    public TimeSpan LongestGap { get; init; }

    /// <summary>Where that stretch begins.</summary>
    public Instant GapFrom { get; init; }

    /// <summary>Readings that say that there is no value.</summary>
    public int NoValue { get; init; }

    /// <summary>Readings that the sensor cannot give, or that a radiation thermometer shows out of its range.</summary>
    public int OutsideRange { get; init; }

    /// <summary>Readings of a device clock that ran ahead.</summary>
    public int FromTheFuture { get; init; }

    /// <summary>Readings that stand out from their neighbours.</summary>
    public int Spikes { get; init; }

    /// <summary>Readings that repeat one value for longer than noise and resolution allow.</summary>
    public int Stuck { get; init; }

    /// <summary>The value that is repeated.</summary>
    public double StuckAt { get; init; } = double.NaN;

    /// <summary>How long it is repeated, before the window included.</summary>
    public TimeSpan StuckFor { get; init; }

    /// <summary>Readings that are bad for one of the reasons above, each once.</summary>
    public int Bad { get; init; }

    /// <summary>Whether one value is repeated all the time and nothing tells whether that can be.</summary>
    public bool IsConstant { get; init; }

    /// <summary>Readings that came long after their device time.</summary>
    public int Late { get; init; }

    /// <summary>Readings without a device time.</summary>
    public int StampedOnArrival { get; init; }

    /// <summary>Readings around a step of this service's clock.</summary>
    public int ClockStepped { get; init; }

    /// <summary>Whether it decides.</summary>
    public bool Matters => ChannelTraits.Matters(Channel);

    /// <summary>Share of the promised readings that is missing or bad, percent.</summary>
    public double LostPercent => Received == 0
        ? 100
        : 100 * (Missing + ((Expected - Missing) * (Bad / (double)Received))) / Expected;
}
