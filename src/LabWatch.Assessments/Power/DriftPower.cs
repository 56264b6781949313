using LabWatch.Assessments.Forecasts;

namespace LabWatch.Assessments.Power;

/// <summary>What the monitoring of one quantity would miss.</summary>
/// <param name="Series">The quantity.</param>
/// <param name="Band">Id of the working band; null where it is about none.</param>
/// <param name="Days">Days that it rests on.</param>
/// <param name="Noise">Standard deviation of a day about its trend, in the unit.</param>
/// <param name="ChecksPerYear">Days with a decided assessment a year, at the present pace.</param>
/// <param name="AtNextCheck">Smallest lasting shift that is found at the next check with 95 %.</param>
/// <param name="WithinFive">Within five checks.</param>
/// <param name="WithinTwenty">Within twenty.</param>
/// <param name="Margin">Distance from the mean of the last days to the limit; null without a limit.</param>
/// <param name="Verdict">How soon a shift as large as the margin is found.</param>
/// <param name="Explanation">The same in words.</param>
public sealed record DriftPower(
    SeriesKey Series,
    string? Band,
    int Days,
    double Noise,
    double ChecksPerYear,
    double AtNextCheck,
    double WithinFive,
    double WithinTwenty,
    double? Margin,
    PowerVerdict Verdict,
    string Explanation);
