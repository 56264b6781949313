namespace LabWatch.Records;

/// <summary>How far each reader of a sequence has come. Positions survive a crash; a reader that repeats a little must do no harm.</summary>
public interface IPositionLedger
{
    /// <summary>A stored position, such as the last assessment that was looked at; 0 where none.</summary>
    ValueTask<long> PositionAsync(string reader, CancellationToken cancellationToken);

    /// <summary>Stores a position.</summary>
    ValueTask SetPositionAsync(string reader, long position, CancellationToken cancellationToken);
}
