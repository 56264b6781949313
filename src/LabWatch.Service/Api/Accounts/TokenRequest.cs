using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts;

/// <summary>A new token.</summary>
internal sealed record TokenRequest(
    [property: Description("What it is for, 1 to 80 characters.")] string? Name,
    [property: Description("Roles of the caller that it shall have.")] IReadOnlyList<string>? Roles,
    [property: Description("Days until it ends, 1 to 366.")] int? ExpiresInDays);
