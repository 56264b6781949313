using LabWatch.Lab.Alerts;

namespace LabWatch.Alerts;

/// <summary>Tries a way of telling somebody, before an alert needs it.</summary>
public interface ITestMessages
{
    /// <summary>The ways that there are at present, people's devices among them.</summary>
    IReadOnlyList<Notifier> Notifiers { get; }

    /// <summary>Makes one attempt to send a test message, and says how it ended; null where there is no such notifier.</summary>
    /// <param name="notifier">Id of the notifier.</param>
    /// <param name="by">Who tries it.</param>
    /// <param name="cancellationToken">Ends the attempt.</param>
    ValueTask<TestOutcome?> SendAsync(string notifier, string by, CancellationToken cancellationToken);
}
