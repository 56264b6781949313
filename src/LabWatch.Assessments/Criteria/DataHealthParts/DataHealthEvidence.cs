using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>How all channels of a source are in one window.</summary>
/// <param name="Window">What is judged: the window, or what is left of it from the first reading on where the source was silent altogether before.</param>
/// <param name="CountsFrom">That first reading; null where the whole window counts.</param>
/// <param name="Channels">Every channel of the source, in its order.</param>
internal sealed record DataHealthEvidence(TimeWindow Window, Instant? CountsFrom, IReadOnlyList<ChannelHealth> Channels)
{
    /// <summary>The channel that decides: of those that matter the one that has lost most, the first of equals.</summary>
    public ChannelHealth Worst => Channels.Where(channel => channel.Matters).DefaultIfEmpty(Channels[0]).MaxBy(channel => channel.LostPercent)!;

    /// <summary>
    /// Examines every channel. A source of which nothing was heard in the lead-in has been put into service, or has come back: it promised nothing before
    /// its first reading.
    /// </summary>
    public static DataHealthEvidence Of(CriterionInput input)
    {
        long first = input.Readings.Series.Where(series => series.Count > 0).Min(series => series.TimeMicroseconds.Span[0]);
        Instant? countsFrom = first > input.Window.Start.Microseconds ? new Instant(first) : null;
        TimeWindow window = new(countsFrom ?? input.Window.Start, input.Window.End);
        return new(
            window,
            countsFrom,
            [.. input.Source.Channels.Select(channel => ChannelExamination.Examine(channel, input.Readings.Find(channel.Id), window, PeerRange(input, channel)))]);
    }

    private static double PeerRange(CriterionInput input, Channel channel) => channel.Quantity is not ChannelQuantity.WellThermometer
        ? 0
        : input.Source.Channels
            .Where(other => other != channel && other.Quantity is ChannelQuantity.WellThermometer && string.Equals(other.Unit, channel.Unit, StringComparison.Ordinal))
            .Select(other => Range(input.Readings.Find(other.Id)))
            .DefaultIfEmpty(0)
            .Max();

    private static double Range(ReadingSeries? series)
    {
        double least = double.PositiveInfinity, most = double.NegativeInfinity;
        foreach (double value in series is null ? [] : series.Values.Span)
        {
            if (double.IsFinite(value))
            {
                (least, most) = (Math.Min(least, value), Math.Max(most, value));
            }
        }

        return most >= least ? most - least : 0;
    }
}
