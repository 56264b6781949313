using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>Who is signed in.</summary>
internal sealed record MeView(
    string Name,
    string DisplayName,
    [property: Description("technician, quality-manager, auditor, administrator.")] IReadOnlyList<string> Roles,
    [property: Description("What the roles allow: read, acknowledge, record-runs, revise-records, read-trail, manage-accounts, inject-faults.")] IReadOnlyList<string> Permissions,
    [property: Description("Nothing but a change of the password is allowed.")] bool MustChangePassword,
    [property: Description("When the session or token ends in any case.")] Instant ExpiresAt,
    [property: Description("False where a token calls.")] bool IsSession,
    [property: Description("When the password was last entered in this session.")] Instant? ConfirmedAt);
