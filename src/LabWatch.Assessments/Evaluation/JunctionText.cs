using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Evaluation;

/// <summary>What a missing temperature of reference junctions means, in words.</summary>
internal static class JunctionText
{
    /// <summary>A clause to follow a count of readings; empty where none is missing for that reason.</summary>
    public static string Behind(ReferenceSource source, Channel channel, int withoutJunction) => withoutJunction == 0
        ? string.Empty
        : $": {Quantities.Count(withoutJunction)} have no temperature, because {Subject(source, channel)} had no fresh reading";

    /// <summary>What measures the junctions, as a subject.</summary>
    public static string Subject(ReferenceSource source, Channel channel) =>
        JunctionTemperatures.ChannelOf(source, channel) is { } junction
            ? $"{junction.Id}, which measures its reference junctions,"
            : "the channel that measures its reference junctions";
}
