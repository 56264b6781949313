using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>An alert with every step of its life.</summary>
internal sealed record AlertDetailView(
    [property: Description("The alert as it is now.")] AlertView Alert,
    [property: Description("Its steps, in order.")] IReadOnlyList<AlertTransitionView> Transitions,
    [property: Description("The caution that goes with every hazard.")] string Caution);
