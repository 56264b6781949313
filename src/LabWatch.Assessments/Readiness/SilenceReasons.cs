using LabWatch.Assessments.Criteria.DataHealthParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Readiness;

/// <summary>What is not heard. Without the reference nothing is known; of the other channels it is told.</summary>
internal static class SilenceReasons
{
    private static readonly TimeSpan Least = TimeSpan.FromSeconds(60);

    public static IReadOnlyList<ReadinessReason> OfReference(ReadinessInput input, SourceNow now)
    {
        if (now.Reference is not { } channel)
        {
            return [Unknown("No thermometer is named that the temperature of this source is taken from.")];
        }

        if (now.LastReading is not { } last)
        {
            return [Unknown($"There is no reading of {channel.Id} yet.")];
        }

        TimeSpan silent = input.Now - last;
        return silent > Longest(channel) ? [Unknown($"The newest reading of {channel.Id} is {Quantities.Duration(silent)} old.")]
            : double.IsNaN(now.Celsius) ? [Unknown($"The newest reading of {channel.Id} gives no temperature{Junction(input, channel, last)}.")]
            : [];
    }

    public static IReadOnlyList<ReadinessReason> OfOthers(ReadinessInput input, SourceNow now)
    {
        if (input.Newest.Count == 0)
        {
            return [];
        }

        List<string> silent = [];
        foreach (Channel channel in input.Source.Channels.Where(channel => channel != now.Reference && ChannelTraits.Matters(channel)))
        {
            Reading? last = SourceNow.Find(input, channel);
            if (last is null)
            {
                silent.Add($"{channel.Id}, never heard");
            }
            else if (input.Now - last.Value.Time is var age && age > Longest(channel))
            {
                silent.Add($"{channel.Id} for {Quantities.Duration(age)}");
            }
        }

        return silent.Count == 0 ? [] : [new(ReasonCode.Silent, $"Silent: {string.Join("; ", silent)}.", false)];
    }

    private static string Junction(ReadinessInput input, Channel channel, Instant at) =>
        NewestJunction.Of(input.Snapshot, input.Source, channel, at, id => SourceNow.Find(input, input.Source.FindChannel(id)!)) is { HasValue: false }
            ? $": {JunctionText.Subject(input.Source, channel)} has no fresh reading"
            : string.Empty;

    private static ReadinessReason Unknown(string text) => new(ReasonCode.NoData, text, true) { PassesByWaiting = true };

    private static TimeSpan Longest(Channel channel) => channel.Interval * 5 > Least ? channel.Interval * 5 : Least;
}
