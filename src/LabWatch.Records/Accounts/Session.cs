using LabWatch.Lab.Time;

namespace LabWatch.Records.Accounts;

/// <summary>A session of a person at a browser.</summary>
/// <param name="Id">UUIDv7.</param>
/// <param name="Account">Name of the account.</param>
/// <param name="StartedAt">When it was started.</param>
/// <param name="ConfirmedAt">When the password was last entered in it.</param>
/// <param name="LastUsedAt">When it was last used, to the minute.</param>
/// <param name="ExpiresAt">When it ends in any case.</param>
/// <param name="Address">Address it was started from.</param>
/// <param name="Agent">What the browser calls itself, shortened.</param>
public sealed record Session(
    Guid Id, string Account, Instant StartedAt, Instant ConfirmedAt, Instant LastUsedAt, Instant ExpiresAt, string Address, string Agent);
