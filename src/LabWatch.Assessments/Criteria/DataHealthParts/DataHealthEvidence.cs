using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>How all channels of a source are in one window.</summary>
/// <param name="Window">The window.</param>
/// <param name="Channels">Every channel of the source, in its order.</param>
internal sealed record DataHealthEvidence(TimeWindow Window, IReadOnlyList<ChannelHealth> Channels)
{
    /// <summary>The channel that decides: of those that matter the one that has lost most, the first of equals.</summary>
    public ChannelHealth Worst => Channels.Where(channel => channel.Matters).DefaultIfEmpty(Channels[0]).MaxBy(channel => channel.LostPercent)!;

    /// <summary>Examines every channel.</summary>
    public static DataHealthEvidence Of(CriterionInput input) => new(
        input.Window,
        [.. input.Source.Channels.Select(channel =>
            ChannelExamination.Examine(channel, input.Readings.Find(channel.Id), input.Window, PeerRange(input, channel)))]);

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
