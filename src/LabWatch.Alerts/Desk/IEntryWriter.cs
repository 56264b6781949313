using LabWatch.Alerts.Journal;

namespace LabWatch.Alerts.Desk;

/// <summary>Makes entries durable before anybody is told of them.</summary>
internal interface IEntryWriter
{
    /// <summary>Writes entries; returns when they are durable, or when the disk has been waited for long enough.</summary>
    /// <param name="entries">The entries, at least one.</param>
    /// <param name="state">The state after them, to start a new journal from where the old one has grown.</param>
    void Write(IReadOnlyList<JournalEntry> entries, JournalState state);
}
