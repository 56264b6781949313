using System.ComponentModel;

namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>What a stranger may know: enough to show the page of the sign-in.</summary>
internal sealed record DoorView(
    string SiteName,
    string Version,
    bool IsDemo,
    [property: Description("Nobody has an account yet: the page of the set-up is next.")] bool SetUpNeeded,
    string Caution);
