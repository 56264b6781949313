using LabWatch.Alerts.Journal;
using Microsoft.Extensions.Logging;

namespace LabWatch.Alerts.Hosting;

/// <summary>The opened journal with the state that it holds. Opening it is the first thing that can fail at a start, and fails it.</summary>
internal sealed class AlertJournalHandle : IDisposable
{
    private readonly JournalFile _file;

    public AlertJournalHandle(AlertsOptions options, ILoggerFactory loggers)
    {
        (_file, JournalContent content, string? copy) = JournalFile.Open(options.DataDirectory);
        foreach (JournalEntry entry in content.Entries)
        {
            State.Apply(entry);
        }

        if (copy is not null)
        {
            Log.JournalDamaged(loggers.CreateLogger<AlertJournalHandle>(), content.DamagedLines, copy);
            _file.Rewrite(State.Snapshot());
        }

        Writer = new JournalWriter(_file, options.JournalPatience, loggers.CreateLogger<JournalWriter>());
    }

    /// <summary>The state; owned by the desk once that runs.</summary>
    public JournalState State { get; } = new();

    /// <summary>Writes what comes after.</summary>
    public JournalWriter Writer { get; }

    /// <inheritdoc/>
    public void Dispose()
    {
        Writer.Dispose();
        _file.Dispose();
    }
}
