namespace LabWatch.Records;

/// <summary>The records database was written by a newer version of the program, which this one must not touch.</summary>
public sealed class RecordsVersionException : InvalidOperationException
{
    /// <summary>Makes the exception without a message.</summary>
    public RecordsVersionException()
    {
    }

    /// <summary>Makes the exception with what was met and what to do.</summary>
    public RecordsVersionException(string message)
        : base(message)
    {
    }

    /// <summary>Makes the exception with what was met and what to do, and its cause.</summary>
    public RecordsVersionException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
