using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One page of alerts, newest raised first.</summary>
internal sealed record AlertListView(
    [property: Description("The alerts.")] IReadOnlyList<AlertView> Items,
    [property: Description("Pass as `after` for the next page; null on the last.")] string? Next);
