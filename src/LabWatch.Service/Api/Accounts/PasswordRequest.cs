namespace LabWatch.Service.Api.Accounts;

/// <summary>Another password.</summary>
internal sealed record PasswordRequest(string? Current, string? New);
