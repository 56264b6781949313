namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>Tokens.</summary>
internal sealed record TokenListView(IReadOnlyList<TokenView> Items);
