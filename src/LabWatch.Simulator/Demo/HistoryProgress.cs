using LabWatch.Lab.Time;

namespace LabWatch.Simulator.Demo;

/// <summary>Progress of filling history.</summary>
/// <param name="Fraction">Part that the broker has acknowledged, 0 to 1.</param>
/// <param name="From">Where the history begins; null before the demo has started.</param>
/// <param name="To">Where it ends; null before the demo has started.</param>
/// <param name="Done">Whether all of it is there.</param>
public sealed record HistoryProgress(double Fraction, Instant? From, Instant? To, bool Done)
{
    /// <summary>Before the demo has started.</summary>
    public static HistoryProgress NotStarted { get; } = new(0, null, null, Done: false);
}
