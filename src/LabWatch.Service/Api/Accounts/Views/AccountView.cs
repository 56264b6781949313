using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>An account.</summary>
internal sealed record AccountView(
    string Name, string DisplayName, IReadOnlyList<string> Roles, bool Disabled, Instant CreatedAt, Instant? LastSignInAt, bool MustChangePassword);
