namespace LabWatch.Service.Api.Accounts;

/// <summary>The password once more.</summary>
internal sealed record ConfirmRequest(string? Password);
