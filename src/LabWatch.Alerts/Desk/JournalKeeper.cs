using LabWatch.Alerts.Journal;

namespace LabWatch.Alerts.Desk;

/// <summary>Writes the journal and starts it anew when it has grown to several times what it must hold.</summary>
internal sealed class JournalKeeper(JournalWriter writer) : IEntryWriter
{
    private const long SmallestGrown = 1 << 20;
    private const int GrownFactor = 4;

    private long _grown = SmallestGrown;

    /// <inheritdoc/>
    public void Write(IReadOnlyList<JournalEntry> entries, JournalState state)
    {
        writer.Write(entries);
        if (writer.Length > _grown)
        {
            writer.Rewrite(state.Snapshot());
            _grown = long.MaxValue;
        }
        else if (_grown == long.MaxValue)
        {
            _grown = Math.Max(SmallestGrown, writer.Length * GrownFactor);
        }
    }
}
