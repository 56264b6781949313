using LabWatch.Alerts.Push;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;

namespace LabWatch.Alerts.Outbox;

/// <summary>Whom to tell at present: the notifiers of the lab file (the log where there is none) and the devices that people have subscribed.</summary>
internal sealed class NotifierBook(ILabSnapshotSource lab, PushDesk push)
{
    /// <summary>The notifier that is there where the lab file names none, so that messages stand at least in the log.</summary>
    public static Notifier Fallback { get; } = new("log", NotifierKind.Log, null, null);

    /// <summary>All of them.</summary>
    public IReadOnlyList<Notifier> Current
    {
        get
        {
            IReadOnlyList<Notifier> configured = lab.Current.Notifiers;
            return [.. configured.Count == 0 ? [Fallback] : configured, .. push.Notifiers];
        }
    }

    /// <summary>The notifier of an id; null where it is gone.</summary>
    public Notifier? Find(string id) =>
        Current.FirstOrDefault(candidate => string.Equals(candidate.Id, id, StringComparison.Ordinal))
        ?? (string.Equals(id, Fallback.Id, StringComparison.Ordinal) ? Fallback : null);
}
