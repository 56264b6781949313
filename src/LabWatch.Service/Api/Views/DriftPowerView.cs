using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>What the monitoring of one quantity would miss.</summary>
internal sealed record DriftPowerView(
    [property: Description("The source as site.source.")] string Source,
    [property: Description("Code of the criterion.")] string Criterion,
    [property: Description("Scope: a band, a channel, or empty.")] string Scope,
    [property: Description("What is followed; see the forecasts.")] string Quantity,
    [property: Description("Unit of the numbers.")] string Unit,
    [property: Description("Set point, degree Celsius; null where unknown.")] double? SetPointCelsius,
    [property: Description("Days that it rests on.")] int Days,
    [property: Description("Standard deviation of a day about its trend; null where unknown.")] double? Noise,
    [property: Description("Days with a decided assessment a year at the present pace; null where unknown.")] double? ChecksPerYear,
    [property: Description("Smallest lasting shift found at the next check, 95 %; null where unknown.")] double? AtNextCheck,
    [property: Description("Within five checks.")] double? WithinFive,
    [property: Description("Within twenty checks.")] double? WithinTwenty,
    [property: Description("Distance from the last days to the limit; null without a limit.")] double? Margin,
    [property: Description("too-few-days, no-limit, seen-at-once, seen-within-five, seen-within-twenty or cannot-be-seen.")] string Verdict,
    [property: Description("The same in words.")] string Explanation);
