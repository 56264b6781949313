namespace LabWatch.Simulator.Demo;

/// <summary>A stretch of time that is published at the history's interval: seconds after <paramref name="From"/> up to but without <paramref name="To"/>.</summary>
/// <param name="From">Seconds since 1970 UTC.</param>
/// <param name="To">Seconds since 1970 UTC.</param>
/// <param name="DoneUpTo">Up to here, this second included, the broker has acknowledged everything.</param>
/// <param name="State">State at <paramref name="DoneUpTo"/>; null where the simulation settles first.</param>
internal sealed record HistorySegment(long From, long To, long DoneUpTo, LabState? State)
{
    /// <summary>Whether nothing is left to do.</summary>
    public bool IsDone => DoneUpTo >= To - 1;
}
