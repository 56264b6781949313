using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.Journal;

namespace LabWatch.Alerts.Hosting;

/// <summary>Tells the hazard watch of alerts that were taken over from the ledger, so that they can return.</summary>
internal sealed class HazardRestorer(HazardWatch watch) : IEntryListener
{
    /// <inheritdoc/>
    public void OnEntries(IReadOnlyList<JournalEntry> entries) =>
        watch.Restore(entries.Where(entry => entry.Open is not null).Select(entry => entry.Open!.Alert));
}
