using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The newest live uncertainty budget of a source in a band at a set point, beside the CMC.</summary>
internal sealed record BudgetView(
    [property: Description("The source as site.source.")] string Source,
    [property: Description("Id of the band.")] string Band,
    [property: Description("Set point, degree Celsius; null where unknown.")] double? SetPointCelsius,
    [property: Description("Id of the assessment.")] string Assessment,
    [property: Description("End of its window.")] Instant WindowEnd,
    [property: Description("Radiance temperature, degree Celsius.")] double RadianceCelsius,
    [property: Description("Combined standard uncertainty, millikelvin.")] double StandardUncertaintyMillikelvin,
    [property: Description("Effective degrees of freedom; null where infinite.")] double? DegreesOfFreedom,
    [property: Description("Coverage factor (95.45 %).")] double CoverageFactor,
    [property: Description("Live expanded uncertainty, millikelvin.")] double ExpandedMillikelvin,
    [property: Description("The CMC, millikelvin; null where none is on record for the band and set point.")] double? CmcMillikelvin,
    [property: Description("What may be reported: the larger of the two, millikelvin.")] double ReportableMillikelvin,
    [property: Description("Whether the CMC holds; null where none is on record.")] bool? CmcHolds,
    [property: Description("The lines, the largest first.")] IReadOnlyList<BudgetLineView> Lines,
    [property: Description("The check by Monte Carlo; null where it cannot be made.")] BudgetCheckView? MonteCarlo,
    [property: Description("The budget in plain words.")] string Explanation);
