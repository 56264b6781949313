namespace LabWatch.Readings;

/// <summary>The engine cannot answer now (closed, locked, disk full, read-only); the same call may succeed later.</summary>
public sealed class StoreUnavailableException : IOException
{
    /// <summary>Makes the exception without a message.</summary>
    public StoreUnavailableException()
    {
    }

    /// <summary>Makes the exception with what happened and what to do.</summary>
    public StoreUnavailableException(string message)
        : base(message)
    {
    }

    /// <summary>Makes the exception with what happened and what to do, and its cause.</summary>
    public StoreUnavailableException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
