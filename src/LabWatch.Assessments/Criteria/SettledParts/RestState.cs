using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Criteria.SettledParts;

/// <summary>How near to rest the reference thermometer is in a window.</summary>
/// <param name="Trend">Straight line through the minute means of the window.</param>
/// <param name="ThinnedTo">Time between the readings that the R-statistic takes.</param>
/// <param name="Thinned">How many it took.</param>
/// <param name="Ratio">R-statistic; NaN from too few.</param>
/// <param name="Critical">What a steady source stays below with a probability of 99 %.</param>
/// <param name="DistanceKelvin">Mean of the window minus set point.</param>
/// <param name="ToleranceKelvin">How near is near enough.</param>
internal sealed record RestState(LinearTrend Trend, TimeSpan ThinnedTo, int Thinned, double Ratio, double Critical, double DistanceKelvin, double ToleranceKelvin)
{
    /// <summary>Probability with which a steady source stays below the critical value.</summary>
    public const double SteadyProbability = 0.99;

    /// <summary>The filters have forgotten where they started after this many values.</summary>
    public const int LeastThinned = 20;

    /// <summary>More would remember the ramp for as long as the lead-in.</summary>
    private const int MostThinned = 30;

    private const double Filter = 0.2;
    private const double Variance = 0.1;

    /// <summary>Thinned beyond: three correlation times leave a correlation of 0.05.</summary>
    private const double CorrelationTimes = 3;
    private static readonly TimeSpan LongestStep = TimeSpan.FromMinutes(1);

    public bool IsAtSetPoint => Math.Abs(DistanceKelvin) <= ToleranceKelvin;

    /// <summary>Whether a change of set point is so recent that rest has to be shown by the R-statistic.</summary>
    public required bool HasChanged { get; init; }

    public bool IsSteady => !HasChanged || Ratio <= Critical;

    public static RestState Of(StabilityEvidence evidence)
    {
        TemperatureSeries within = evidence.Within;
        TemperatureSeries minutes = within.MinuteMeans();
        LinearTrend trend = LinearTrend.Fit(minutes.TimeMicroseconds.Span, minutes.Celsius.Span);
        trend = trend with { SlopePerHour = SlopeError.Of(trend, minutes, within, evidence) };
        TimeSpan step = Step(trend, evidence.Reference.Interval);
        RStatistic statistic = new(Filter, Variance, Variance);
        Instant changed = evidence.SetPoint.ChangedAt ?? evidence.Schedule.SpanOf(evidence.Window).Start, recent = evidence.Window.End - (MostThinned * step);
        long next = Math.Max(changed.Microseconds, recent.Microseconds);
        Take(statistic, evidence.Before, step, ref next);
        Take(statistic, within, step, ref next);
        double setPoint = evidence.SetPoint.Celsius;
        return new(
            trend, step, statistic.Count, statistic.Count < LeastThinned ? double.NaN : statistic.Ratio, RStatisticDistribution.Of(Filter, Variance, Variance).Quantile(SteadyProbability),
            within.MeanCelsius - setPoint, StabilityObstacles.AtTemperatureKelvin(setPoint))
        {
            HasChanged = evidence.SetPoint.ChangedAt is not null,
        };
    }

    private static TimeSpan Step(LinearTrend trend, TimeSpan interval)
    {
        double seconds = trend.Autocorrelation > 0 ? -trend.LagMicros / 1e6 / Math.Log(trend.Autocorrelation) * CorrelationTimes : 0;
        TimeSpan step = TimeSpan.FromSeconds(Math.Min(seconds, LongestStep.TotalSeconds));
        return step > interval ? step : interval;
    }

    private static void Take(RStatistic statistic, TemperatureSeries series, TimeSpan step, ref long next)
    {
        ReadOnlySpan<long> times = series.TimeMicroseconds.Span;
        long length = step.Ticks / TimeSpan.TicksPerMicrosecond;
        for (int i = 0; i < times.Length; i++)
        {
            if (times[i] >= next)
            {
                statistic.Add(series.Celsius.Span[i]);
                next = times[i] + length;
            }
        }
    }
}
