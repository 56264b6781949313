using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Readiness;

/// <summary>When the source will be at its set point, and from when on it can have been shown that it is stable there.</summary>
internal static class ForecastReasons
{
    public static (ReadyForecast Forecast, ReadinessReason Reason)? Of(ReadinessInput input, SourceNow now, ReadinessState state) => state switch
    {
        ReadinessState.Heating or ReadinessState.Cooling => OnItsWay(input, now),
        ReadinessState.Settling => Settling(input),
        _ => null,
    };

    private static (ReadyForecast, ReadinessReason)? OnItsWay(ReadinessInput input, SourceNow now)
    {
        double tolerance = StabilityObstacles.AtTemperatureKelvin(now.SetPointCelsius);
        if (input.Recent is null || now.Reference is not { } reference)
        {
            return null;
        }

        Approach? approach = Approach.Of(Temperatures(input, reference, input.Recent), now.SetPointCelsius, tolerance);
        if (approach is null)
        {
            return (new(null, null, null), Told("When it will be at its set point cannot be told from its recent readings."));
        }

        Instant earliest = input.Now + approach.Earliest;
        Instant? ready = Schedule(input) is { } schedule ? FirstJudged(schedule, earliest + schedule.Reach) : null;
        string then = ready is { } at ? $"; its stability there can have been shown at {Moments.Text(at)} at the earliest" : string.Empty;
        return (
            new(earliest, input.Now + approach.Latest, ready),
            Told($"If it goes on as in the last {Quantities.Duration(approach.Within)} ({Quantities.Significant(approach.KelvinPerHour)} K/h) it will be within {Quantities.Significant(tolerance)} K "
                + $"of its set point in {Quantities.Duration(approach.Earliest)} to {Quantities.Duration(approach.Latest)}{then}."));
    }

    private static (ReadyForecast, ReadinessReason)? Settling(ReadinessInput input)
    {
        if (Schedule(input) is not { } schedule)
        {
            return null;
        }

        Instant next = schedule.LastDue(input.Now) + schedule.Every + schedule.Grace;
        Instant?[] bounds =
        [
            next,
            ChangedAt(input) is { } changed ? FirstJudged(schedule, changed + schedule.Reach) : null,
            FirstHeard(input) is { } heard ? FirstJudged(schedule, heard + schedule.Window + (schedule.LeadIn * StabilityObstacles.LeastLeadInCoverage)) : null,
        ];
        Instant ready = bounds.Max()!.Value;
        return (new(null, null, ready), Told($"The next window that can show its stability is judged at {Moments.Text(ready)}."));
    }

    /// <summary>When the first window on the schedule that ends then or later will have been judged.</summary>
    private static Instant FirstJudged(CriterionSchedule schedule, Instant end)
    {
        Instant onSchedule = schedule.EndAtOrBefore(end);
        return (onSchedule < end ? onSchedule + schedule.Every : onSchedule) + schedule.Grace;
    }

    private static CriterionSchedule? Schedule(ReadinessInput input) =>
        input.Criteria.FirstOrDefault(criterion => string.Equals(criterion.Code, CriterionCode.Stability, StringComparison.Ordinal))?.Schedule;

    private static Instant? ChangedAt(ReadinessInput input) =>
        input.Source.Channels.FirstOrDefault(channel => channel.Quantity is ChannelQuantity.SetPoint) is { } channel
            ? SetPointHistory.Of(input.Recent?.Find(channel.Id)).ChangedAt
            : null;

    /// <summary>The first recent reading of the reference; null where it was heard all the time.</summary>
    private static Instant? FirstHeard(ReadinessInput input) =>
        SourceNow.ReferenceOf(input.Source) is { } reference
        && input.Recent?.Find(reference.Id) is { Count: > 0 } series
        && new Instant(series.TimeMicroseconds.Span[0]) is var first
        && first - input.Recent.Window.Start > reference.Interval * 5
            ? first
            : null;

    private static TemperatureSeries Temperatures(ReadinessInput input, Channel reference, ReadingWindow recent)
    {
        TimeWindow span = new(ChangedAt(input) ?? recent.Window.Start, recent.Window.End);
        return span.End <= span.Start
            ? TemperatureSeries.Empty
            : TemperatureSeries.Of(
                recent.Find(reference.Id)?.Slice(span), reference, CertificateTimeline.Of(input.Snapshot, reference.Key, span),
                JunctionTemperatures.Of(input.Snapshot, reference, span, recent));
    }

    private static ReadinessReason Told(string text) => new(ReasonCode.Expected, text, false);
}
