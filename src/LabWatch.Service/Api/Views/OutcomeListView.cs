using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One page of outcomes, newest window first, highest revisions only.</summary>
internal sealed record OutcomeListView(
    [property: Description("The outcomes.")] IReadOnlyList<OutcomeView> Items,
    [property: Description("Pass as `after` for the next page; null on the last.")] string? Next);
