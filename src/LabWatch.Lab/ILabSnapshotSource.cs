namespace LabWatch.Lab;

/// <summary>Gives the snapshot of the site that is in force now.</summary>
public interface ILabSnapshotSource
{
    /// <summary>The present snapshot. Reading it costs nothing; it never changes in place.</summary>
    LabSnapshot Current { get; }

    /// <summary>Raised after <see cref="Current"/> has become another snapshot.</summary>
    event EventHandler? Changed;
}
