using LabWatch.Lab.Assessments;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>The side results: totals of the source, and of each channel only what there is to say.</summary>
internal static class DataHealthFigures
{
    public static IReadOnlyList<AssessmentFigure> Of(DataHealthEvidence evidence) =>
    [
        Count("channel-count", evidence.Channels.Count),
        Count("expected-count", evidence.Channels.Sum(channel => channel.Expected)),
        Count(FigureName.ReadingCount, evidence.Channels.Sum(channel => channel.Received)),
        Count("late-count", evidence.Channels.Sum(channel => channel.Late)),
        Count("stamped-on-arrival-count", evidence.Channels.Sum(channel => channel.StampedOnArrival)),
        Count("clock-stepped-count", evidence.Channels.Sum(channel => channel.ClockStepped)),
        .. evidence.Channels.SelectMany(Of),
    ];

    private static IEnumerable<AssessmentFigure> Of(ChannelHealth channel)
    {
        string id = channel.Channel.Id;
        if (channel.LostPercent > 0)
        {
            yield return new($"lost-{id}", new Estimate(channel.LostPercent, 0), "%");
        }

        (string Name, int Count)[] counts =
        [
            ("missing", channel.Missing), ("no-value", channel.NoValue), ("outside-range", channel.OutsideRange), ("stuck", channel.Stuck),
            ("spikes", channel.Spikes), ("from-the-future", channel.FromTheFuture),
        ];
        foreach ((string name, int count) in counts.Where(item => item.Count > 0))
        {
            yield return Count($"{name}-{id}", count);
        }
    }

    private static AssessmentFigure Count(string name, int count) => new(name, new Estimate(count, 0), "1");
}
