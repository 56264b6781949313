using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One page of calibration runs.</summary>
internal sealed record RunListView(
    [property: Description("The runs, latest start first.")] IReadOnlyList<RunView> Items,
    [property: Description("Pass it as after for the next page; null on the last.")] string? Next);
