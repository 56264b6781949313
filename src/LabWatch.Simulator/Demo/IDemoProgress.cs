namespace LabWatch.Simulator.Demo;

/// <summary>How far the history of the demo has been filled.</summary>
public interface IDemoProgress
{
    /// <summary>The present progress; a new value each time it changes.</summary>
    HistoryProgress Current { get; }
}
