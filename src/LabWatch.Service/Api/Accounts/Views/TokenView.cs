using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>A token; its value is shown nowhere.</summary>
internal sealed record TokenView(
    Guid Id, string Account, string Name, IReadOnlyList<string> Roles, Instant CreatedAt, Instant ExpiresAt, Instant? LastUsedAt, Instant? RevokedAt);
