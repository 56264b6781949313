namespace LabWatch.Service.Api.Accounts.Views;

/// <summary>The caller's sessions.</summary>
internal sealed record SessionListView(IReadOnlyList<SessionView> Items);
