using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts;

/// <summary>A new account.</summary>
internal sealed record AccountRequest(
    [property: Description("Small letters, digits and hyphens, 1 to 63; it is never given again.")] string? Name,
    [property: Description("Name for people, 1 to 80 characters.")] string? DisplayName,
    [property: Description("At least one of technician, quality-manager, auditor, administrator.")] IReadOnlyList<string>? Roles);
