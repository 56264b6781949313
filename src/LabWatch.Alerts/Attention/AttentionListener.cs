using LabWatch.Alerts.Desk;
using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;

namespace LabWatch.Alerts.Attention;

/// <summary>Tells the hazard watch that somebody looks after a source: who acknowledges one of its alerts does.</summary>
internal sealed class AttentionListener(HazardWatch watch) : IEntryListener
{
    /// <inheritdoc/>
    public void OnEntries(IReadOnlyList<JournalEntry> entries)
    {
        foreach (JournalEntry entry in entries)
        {
            if (entry.Transition is { Event: AlertEvent.Acknowledged } step)
            {
                watch.Attend(step.Alert.Source, step.At);
            }
        }
    }
}
