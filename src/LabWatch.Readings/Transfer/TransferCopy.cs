namespace LabWatch.Readings.Transfer;

/// <summary>What a copy did.</summary>
public sealed class TransferCopy
{
    /// <summary>Hours of sources that the one side has.</summary>
    public long Hours { get; internal set; }

    /// <summary>Hours that were the same on the other side already.</summary>
    public long HoursThereAlready { get; internal set; }

    /// <summary>Readings newly stored.</summary>
    public long Readings { get; internal set; }

    /// <summary>Readings that have another value on the other side, which stays.</summary>
    public List<ReadingConflict> Conflicts { get; } = [];
}
