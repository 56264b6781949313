using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Lab.Instruments;

/// <summary>An instrument's stay in a channel. Stays in one channel never overlap.</summary>
/// <param name="Instrument">Id of the instrument.</param>
/// <param name="Channel">Channel it feeds.</param>
/// <param name="From">First instant of the stay.</param>
/// <param name="Until">First instant after the stay; null while it lasts.</param>
public sealed record Installation(string Instrument, ChannelKey Channel, Instant From, Instant? Until)
{
    /// <summary>Whether the instrument is in the channel at an instant.</summary>
    public bool Covers(Instant instant) => instant >= From && (Until is not { } end || instant < end);
}
