namespace LabWatch.Alerts.Journal;

/// <summary>The alert journal at rest. One writer.</summary>
internal interface IAlertJournal
{
    /// <summary>Bytes of the journal.</summary>
    long Length { get; }

    /// <summary>Makes entries durable, all in one write. Throws <see cref="IOException"/> where it cannot.</summary>
    void Append(IReadOnlyList<JournalEntry> entries);

    /// <summary>Replaces the journal by one that holds just these entries; a crash leaves the former or the new one.</summary>
    void Rewrite(IReadOnlyList<JournalEntry> entries);
}
