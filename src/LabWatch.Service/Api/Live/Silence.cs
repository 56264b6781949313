using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Live;

/// <summary>When a channel counts as silent on the pages. (The hazard of silence is watched by itself, with its own delays.)</summary>
internal static class Silence
{
    private const int IntervalsMissed = 3;
    private static readonly TimeSpan Least = TimeSpan.FromSeconds(10);

    /// <summary>Whether the newest reading of a channel is older than three promised intervals, and than 10 s.</summary>
    public static bool IsSilent(Channel channel, Instant newest, Instant now) => now - newest > Limit(channel);

    private static TimeSpan Limit(Channel channel) => channel.Interval * IntervalsMissed > Least ? channel.Interval * IntervalsMissed : Least;
}
