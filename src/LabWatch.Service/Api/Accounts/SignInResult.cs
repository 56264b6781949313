namespace LabWatch.Service.Api.Accounts;

/// <summary>What became of a sign-in.</summary>
/// <param name="Kind">What became of it.</param>
/// <param name="Wait">How long to wait, where there were too many attempts.</param>
internal sealed record SignInResult(SignInKind Kind, TimeSpan Wait = default);
