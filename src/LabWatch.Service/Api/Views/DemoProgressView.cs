using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>How far the demo's history is filled.</summary>
internal sealed record DemoProgressView(
    [property: Description("Share that is done, 0 to 1.")] double Fraction,
    [property: Description("What is going on, in words.")] string Text);
