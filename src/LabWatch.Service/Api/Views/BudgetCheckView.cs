using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>The same budget by propagation of distributions (JCGM 101).</summary>
internal sealed record BudgetCheckView(
    [property: Description("Lower end of the 95.45 % interval, degree Celsius.")] double LowCelsius,
    [property: Description("Upper end, degree Celsius.")] double HighCelsius,
    [property: Description("Standard uncertainty, millikelvin.")] double StandardUncertaintyMillikelvin,
    [property: Description("Trials.")] int Trials,
    [property: Description("Seed.")] ulong Seed,
    [property: Description("Whether both ends agree with value and expanded uncertainty to one significant digit of u.")] bool Agrees);
