using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>A session of the caller.</summary>
internal sealed record SessionView(Guid Id, Instant StartedAt, Instant LastUsedAt, Instant ExpiresAt, string Address, string Agent, bool IsCurrent);
