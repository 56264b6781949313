using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>Where the control charts of a series of day means stand (ISO 7870-4, -6, -9). Averages and sums in standard deviations.</summary>
internal sealed record ChartStateView(
    [property: Description("Days that target, standard deviation and autocorrelation come from.")] int ReferenceDays,
    [property: Description("Days charted since.")] int ChartedDays,
    [property: Description("Mean of the reference days, in unit.")] double Target,
    [property: Description("Standard deviation of the residuals once made independent, in unit.")] double StandardDeviation,
    [property: Description("Correlation of neighbouring days in the reference days.")] double Autocorrelation,
    [property: Description("Exponentially weighted moving average.")] double Ewma,
    [property: Description("Its limit on either side.")] double EwmaLimit,
    [property: Description("Average run length without a change, days.")] double EwmaRunLength,
    [property: Description("Average run length at a lasting change of one standard deviation, days.")] double EwmaRunLengthAtOne,
    [property: Description("Cumulative sum for an increase.")] double CusumUpper,
    [property: Description("Cumulative sum for a decrease, positive.")] double CusumLower,
    [property: Description("Their decision interval.")] double CusumLimit,
    [property: Description("Average run length of the sums without a change, days.")] double CusumRunLength,
    [property: Description("Average run length of the sums at a lasting change of one standard deviation, days.")] double CusumRunLengthAtOne,
    [property: Description("none, increase or decrease.")] string Signal,
    [property: Description("Since when it signals without a break; null where it does not.")] Instant? SignalsSince);
