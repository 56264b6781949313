namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>All accounts.</summary>
internal sealed record AccountListView(IReadOnlyList<AccountView> Items);
