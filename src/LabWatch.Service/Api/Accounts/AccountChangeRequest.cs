using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts;

/// <summary>What to change in an account; what is missing stays.</summary>
internal sealed record AccountChangeRequest(
    string? DisplayName,
    IReadOnlyList<string>? Roles,
    bool? Disabled,
    [property: Description("True makes a one-time password.")] bool? ResetPassword);
