namespace LabWatch.Records.Audit.Verification;

/// <summary>Rows of a query, one after the other, without conversions. Not thread-safe.</summary>
internal abstract class TableScan : IDisposable
{
    /// <summary>Goes to the next row; false behind the last. Throws <see cref="UnreadableException"/> where the table cannot be read on.</summary>
    public abstract bool Read();

    /// <summary>What a cell of the row holds.</summary>
    public abstract CellKind Kind(int column);

    /// <summary>A cell of kind whole or truth.</summary>
    public abstract long Whole(int column);

    /// <summary>A cell of kind real.</summary>
    public abstract double Real(int column);

    /// <summary>A cell of kind text, UUID (as UTF-8) or bytes; valid until the next row.</summary>
    public abstract ReadOnlySpan<byte> Bytes(int column);

    /// <inheritdoc/>
    public abstract void Dispose();
}
