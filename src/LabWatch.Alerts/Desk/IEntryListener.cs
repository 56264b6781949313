using LabWatch.Alerts.Journal;

namespace LabWatch.Alerts.Desk;

/// <summary>Learns of journal entries once they are durable (or the disk has been waited for long enough). Returns at once.</summary>
internal interface IEntryListener
{
    /// <summary>Takes the entries of one batch, in order. Called from the desk's thread only.</summary>
    void OnEntries(IReadOnlyList<JournalEntry> entries);
}
