using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Forecasts;

/// <summary>
/// Where the control charts of a series stand. Day means are made independent by the autocorrelation of the reference days (ISO 7870-9) and
/// standardised by their mean and standard deviation.
/// </summary>
/// <param name="ReferenceDays">Days from which target, standard deviation and autocorrelation come.</param>
/// <param name="ChartedDays">Days charted since.</param>
/// <param name="Target">Mean of the reference days, in the unit of the series.</param>
/// <param name="StandardDeviation">Standard deviation of the independent residuals, in the unit of the series.</param>
/// <param name="Autocorrelation">Correlation of neighbouring days in the reference days.</param>
/// <param name="Ewma">Exponentially weighted moving average (weight 0.2), in standard deviations.</param>
/// <param name="EwmaLimit">Its limit on either side.</param>
/// <param name="CusumUpper">Cumulative sum for an increase (reference value 0.5), in standard deviations.</param>
/// <param name="CusumLower">Cumulative sum for a decrease, positive.</param>
/// <param name="CusumLimit">Their decision interval.</param>
/// <param name="Signal">What signals: <c>none</c>, <c>increase</c> or <c>decrease</c>.</param>
/// <param name="SignalsSince">Since which day it has signalled without a break; null where it does not.</param>
public sealed record ChartState(
    int ReferenceDays,
    int ChartedDays,
    double Target,
    double StandardDeviation,
    double Autocorrelation,
    double Ewma,
    double EwmaLimit,
    double CusumUpper,
    double CusumLower,
    double CusumLimit,
    string Signal,
    Instant? SignalsSince);
