using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>An account after a change.</summary>
internal sealed record AccountAnswer(
    AccountView Account,
    [property: Description("To be handed to the person and changed at the first sign-in. Shown this once; null where no password was made.")] string? OneTimePassword);
