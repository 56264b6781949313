using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Journal;

/// <summary>
/// One line of the alert journal. Exactly one of the members besides <see cref="Number"/> says what it is; <see cref="Messages"/> goes with
/// <see cref="Transition"/>. The format is documented in <c>docs/reference/alerts.md</c>; members are only ever added.
/// </summary>
/// <param name="Number">Rises by one with each entry that is to be recorded in the ledger; 0 on the others.</param>
internal sealed record JournalEntry(long Number)
{
    /// <summary>A step in the life of an alert.</summary>
    public AlertTransition? Transition { get; init; }

    /// <summary>The messages that the step causes.</summary>
    public IReadOnlyList<OutboxMessage>? Messages { get; init; }

    /// <summary>A message after an attempt to send it.</summary>
    public OutboxMessage? Settled { get; init; }

    /// <summary>All entries up to this number stand in the ledger.</summary>
    public long? RecordedUpTo { get; init; }

    /// <summary>How far the assessments were followed.</summary>
    public FollowedPosition? Followed { get; init; }

    /// <summary>An open alert at its last step, as the ledger has it: at the head of a rewritten journal, or taken over from the ledger.</summary>
    public AlertTransition? Open { get; init; }

    /// <summary>A message still to be sent, as the ledger has it: as for <see cref="Open"/>.</summary>
    public OutboxMessage? Pending { get; init; }

    /// <summary>True where people are told of the transition by the next summary; null elsewhere.</summary>
    public bool? Held { get; init; }

    /// <summary>The alerts that wait for the next summary, from here on: empty with a summary, all of them at the end of what a rewritten journal takes over; null elsewhere.</summary>
    public IReadOnlyList<Guid>? HeldAlerts { get; init; }

    /// <summary>The next number to be given: at the head of a rewritten journal.</summary>
    public long? NextNumber { get; init; }

    /// <summary>Whether the entry is to be recorded in the ledger.</summary>
    public bool IsForLedger => Number > 0;
}
