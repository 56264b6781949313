using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One page of revisions.</summary>
internal sealed record RevisionListView(
    [property: Description("The revisions, newest recorded first.")] IReadOnlyList<RevisionView> Items,
    [property: Description("Pass it as after for the next page; null on the last.")] string? Next);
