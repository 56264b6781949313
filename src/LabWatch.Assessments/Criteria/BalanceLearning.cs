using System.Security.Cryptography;
using System.Text;
using LabWatch.Assessments.Criteria.BalanceParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Criteria;

/// <summary>Learns the baseline of <c>heater-balance</c> and <c>reference-agreement</c> from the readings of a span in which a source was in order, a day at a time.</summary>
/// <param name="snapshot">What is configured.</param>
/// <param name="source">The source.</param>
/// <param name="channel">Its heater power, or a well thermometer that is not the reference.</param>
public sealed class BalanceLearning(LabSnapshot snapshot, ReferenceSource source, Channel channel)
{
    private readonly List<BalanceBlocks> _days = [];
    private readonly StringBuilder _digests = new();

    /// <summary>Ids of the channels to read; empty where nothing can be learnt: no reference, no air temperature, or a channel that has no balance.</summary>
    public IReadOnlyList<string> Channels { get; } =
        channel.Quantity is ChannelQuantity.HeaterPower || (channel.Quantity is ChannelQuantity.WellThermometer && !channel.IsReference) ? BalanceBlocks.Channels(source, channel.Id) : [];

    /// <summary>Takes the readings of the next part of the span.</summary>
    /// <param name="part">A part of whole ten minutes, the one after the part before.</param>
    /// <param name="readings">Readings of <see cref="Channels"/>.</param>
    public void Add(TimeWindow part, ReadingWindow readings)
    {
        _days.Add(BalanceBlocks.Of(snapshot, source, channel, part, readings));
        _digests.Append(ReadingsDigest.Of(readings)).Append('\n');
    }

    /// <summary>The balance, with a digest over the digests of the parts; null where too few ten-minute means count to learn from.</summary>
    public LearntBalance? Learn() => _days.Count == 0 || BalanceLearner.Learn(BalanceBlocks.Join(_days), channel.Id) is not { } balance
        ? null
        : balance with { ReadingsDigest = Convert.ToHexStringLower(SHA256.HashData(Encoding.UTF8.GetBytes(_digests.ToString()))) };
}
