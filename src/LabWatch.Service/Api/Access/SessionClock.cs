using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Access;

/// <summary>
/// The clock of sessions, tokens and throttling. They are about people, so they keep real time even where the laboratory's clock runs
/// faster; what goes on the record carries the laboratory's time.
/// </summary>
/// <param name="Clock">The clock.</param>
internal sealed record SessionClock(TimeProvider Clock)
{
    /// <summary>The time now.</summary>
    public Instant Now => Instant.Now(Clock);
}
