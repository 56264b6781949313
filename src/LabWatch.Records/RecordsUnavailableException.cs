namespace LabWatch.Records;

/// <summary>The records database cannot answer now (closed, locked, disk full, server down); the same call may succeed later.</summary>
public sealed class RecordsUnavailableException : IOException
{
    /// <summary>Makes the exception without a message.</summary>
    public RecordsUnavailableException()
    {
    }

    /// <summary>Makes the exception with what happened and what to do.</summary>
    public RecordsUnavailableException(string message)
        : base(message)
    {
    }

    /// <summary>Makes the exception with what happened and what to do, and its cause.</summary>
    public RecordsUnavailableException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
