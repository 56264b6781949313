namespace LabWatch.Lab.Time;

/// <summary>A span of time that includes its start and excludes its end.</summary>
/// <param name="Start">First instant inside.</param>
/// <param name="End">First instant after; not before <paramref name="Start"/>.</param>
public readonly record struct TimeWindow(Instant Start, Instant End)
{
    /// <summary>Length of the window.</summary>
    public TimeSpan Duration => End - Start;

    /// <summary>Whether an instant lies inside.</summary>
    public bool Contains(Instant instant) => instant >= Start && instant < End;

    /// <summary>RFC 3339 interval, start and end separated by a solidus (ISO 8601).</summary>
    public override string ToString() => $"{Start}/{End}";
}
