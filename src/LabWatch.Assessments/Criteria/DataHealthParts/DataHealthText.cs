using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>The health of a source's data in plain words: the channel that decides first, then the others that have something to say.</summary>
internal static class DataHealthText
{
    private const int MostOthers = 6;

    public static string Of(DataHealthEvidence evidence, AcceptanceLimit? limit, string? obstacle, Decision decision)
    {
        ChannelHealth worst = evidence.Worst;
        string notDecided = obstacle is null ? string.Empty : $"Not decided: {obstacle}. ";
        string verdict = limit is null || obstacle is not null ? ", for information only" : $"; the limit is {Plain(limit.Maximum)} %; it {(decision is Decision.Pass ? "passes" : "fails")}";
        return $"{notDecided}{Worst(evidence, worst)}{verdict}. {Others(evidence, worst)}{Constant(evidence)}{Delivery(evidence)}".TrimEnd();
    }

    private static string Worst(DataHealthEvidence evidence, ChannelHealth worst)
    {
        string span = $"the {Quantities.Duration(evidence.Window.Duration)}"
            + (evidence.CountsFrom is { } from ? $" since the source was first heard at {Moments.Text(from)}" : string.Empty);
        return worst.LostPercent > 0
            ? $"Of the readings that {worst.Channel.Id} promises in {span}, {Percent(worst)} are missing or bad: {What(worst)}"
            : $"All channels that results or hazards rest on sent everything that they promise in {span}, and nothing in it is bad";
    }

    private static string Others(DataHealthEvidence evidence, ChannelHealth worst)
    {
        List<ChannelHealth> others =
            [.. evidence.Channels.Where(channel => channel != worst && channel.LostPercent > 0).OrderByDescending(channel => channel.LostPercent)];
        string more = others.Count > MostOthers ? $"; and {Quantities.Count(others.Count - MostOthers)} more" : string.Empty;
        return others.Count == 0
            ? string.Empty
            : $"Others: {string.Join("; ", others.Take(MostOthers).Select(channel => $"{channel.Channel.Id} {Percent(channel)} ({What(channel)})"))}{more}. ";
    }

    private static string Constant(DataHealthEvidence evidence)
    {
        List<ChannelHealth> constant = [.. evidence.Channels.Where(channel => channel.IsConstant)];
        return constant.Count == 0
            ? string.Empty
            : $"One value throughout, which its resolution may explain: {string.Join(", ", constant.Select(channel => channel.Channel.Id))}. ";
    }

    private static string Delivery(DataHealthEvidence evidence)
    {
        int received = evidence.Channels.Sum(channel => channel.Received);
        List<string> parts = [];
        Add(evidence.Channels.Sum(channel => channel.Late), "came late");
        Add(evidence.Channels.Sum(channel => channel.StampedOnArrival), "had no device time");
        Add(evidence.Channels.Sum(channel => channel.ClockStepped), "came around a step of this service's clock");
        return parts.Count == 0 ? string.Empty : $"Of {Quantities.Count(received)} readings {string.Join(", ", parts)}. ";

        void Add(int count, string what)
        {
            if (count > 0)
            {
                parts.Add($"{Quantities.Count(count)} {what}");
            }
        }
    }

    private static string What(ChannelHealth channel)
    {
        List<string> parts = [];
        if (channel.Missing > 0)
        {
            parts.Add($"{Quantities.Count(channel.Missing)} of {Quantities.Count(channel.Expected)} missing"
                + $" (longest gap {Quantities.Duration(channel.LongestGap)} from {Moments.Text(channel.GapFrom)})");
        }

        Add(channel.NoValue, "without a value");
        Add(channel.OutsideRange, ChannelTraits.MayShowOutOfRange(channel.Channel) ? "out of its range, which is no fault" : "outside the range of the sensor");
        if (channel.Stuck > 0)
        {
            parts.Add($"{Quantities.Count(channel.Stuck)} stuck at {Plain(channel.StuckAt)} {Unit(channel.Channel)}".TrimEnd() + $" for {Quantities.Duration(channel.StuckFor)}");
        }

        Add(channel.Spikes, channel.Spikes == 1 ? "spike" : "spikes");
        Add(channel.FromTheFuture, "with a device time ahead of the clock");
        return string.Join(", ", parts);

        void Add(int count, string what)
        {
            if (count > 0)
            {
                parts.Add($"{Quantities.Count(count)} {what}");
            }
        }
    }

    private static string Unit(Channel channel) => channel.Unit switch { "Cel" => "degC", "/" => string.Empty, _ => channel.Unit };

    private static string Percent(ChannelHealth channel) => (channel.LostPercent < 0.1 ? "under 0.1" : Quantities.Fixed(channel.LostPercent, 1)) + " %";

    private static string Plain(double value) => value.ToString("0.######", System.Globalization.CultureInfo.InvariantCulture);
}
