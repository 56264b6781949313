using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts;

/// <summary>Somebody signs in.</summary>
internal sealed record SignInRequest(string? Name, [property: Description("The password; in a demo the code that it printed.")] string? Password);
