using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One line of a live uncertainty budget.</summary>
internal sealed record BudgetLineView(
    [property: Description("What contributes.")] string Name,
    [property: Description("Standard uncertainty that counts, millikelvin.")] double StandardUncertaintyMillikelvin,
    [property: Description("Whether it is measured or follows from what is stated about the source; else it is claimed.")] bool IsMeasured,
    [property: Description("What the laboratory's budget claims for it, millikelvin; null where nothing.")] double? ClaimedMillikelvin,
    [property: Description("Degrees of freedom; null where infinite.")] double? DegreesOfFreedom,
    [property: Description("Share in the combined variance, 0 to 1.")] double Share);
