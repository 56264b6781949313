using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts;

/// <summary>The first administrator.</summary>
internal sealed record SetUpRequest(
    [property: Description("The code that the service printed at its start.")] string? Code,
    string? Name,
    string? DisplayName,
    string? Password);
