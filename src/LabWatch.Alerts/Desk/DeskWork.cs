using LabWatch.Alerts.Journal;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Desk;

/// <summary>Something for the alert desk to do; all work goes through one queue.</summary>
internal abstract record DeskWork
{
    /// <summary>A condition appeared or went.</summary>
    public sealed record Condition(AlertCondition Found) : DeskWork;

    /// <summary>Somebody does something with an alert and waits for it.</summary>
    public abstract record Asked(Guid Id, TaskCompletionSource<Alert?> Answer) : DeskWork;

    /// <summary>Somebody acknowledges an alert.</summary>
    public sealed record Acknowledge(Guid Id, string By, string? Note, TaskCompletionSource<Alert?> Answer) : Asked(Id, Answer);

    /// <summary>Somebody shelves an alert or takes it out of service.</summary>
    public sealed record Shelve(Guid Id, AlertShelf Shelf, TaskCompletionSource<Alert?> Answer) : Asked(Id, Answer);

    /// <summary>Somebody ends that.</summary>
    public sealed record Unshelve(Guid Id, string By, string? Note, TaskCompletionSource<Alert?> Answer) : Asked(Id, Answer);

    /// <summary>Time has passed: shelves end, and what was held back is summarised.</summary>
    public sealed record Tick : DeskWork;

    /// <summary>A message after an attempt to send it.</summary>
    public sealed record Settled(OutboxMessage Message) : DeskWork;

    /// <summary>The ledger has all entries up to a number.</summary>
    public sealed record Recorded(long UpTo) : DeskWork;

    /// <summary>What the ledger has open and the journal does not know.</summary>
    public sealed record Adopt(IReadOnlyList<AlertTransition> Open, IReadOnlyList<OutboxMessage> Pending) : DeskWork;

    /// <summary>What a batch of assessments means.</summary>
    public sealed record Follow(IReadOnlyList<AlertCondition> Found, FollowedPosition Position) : DeskWork;

    /// <summary>Answered when everything queued before is done.</summary>
    public sealed record Barrier(TaskCompletionSource Answer) : DeskWork;
}
