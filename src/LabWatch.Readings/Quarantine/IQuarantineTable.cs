namespace LabWatch.Readings.Quarantine;

/// <summary>The table of refused messages in a database. Throws what the database throws; not thread-safe.</summary>
internal interface IQuarantineTable : IDisposable
{
    /// <summary>Keeps rows in one transaction; a row with a known fingerprint is counted as a repeat. Drops the oldest beyond the limits.</summary>
    void Add(IEnumerable<QuarantineRow> rows);

    /// <summary>The newest rows, newest first.</summary>
    List<QuarantineRow> Newest(int count);

    /// <summary>How many were ever refused.</summary>
    long Refused();

    /// <summary>Closes the connection after a failure; the next call opens another.</summary>
    void Close();
}
