using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One page of assessments, newest window first, highest revisions only.</summary>
internal sealed record AssessmentListView(
    [property: Description("The assessments.")] IReadOnlyList<AssessmentView> Items,
    [property: Description("Pass as `after` for the next page; null on the last.")] string? Next);
