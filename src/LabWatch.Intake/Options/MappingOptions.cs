using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;

namespace LabWatch.Intake.Options;

/// <summary>How the JSON of a gateway that knows nothing of SenML becomes readings.</summary>
public sealed record MappingOptions
{
    /// <summary>
    /// Topics that it is for: levels as they stand, <c>+</c> for any one level, <c>{source}</c> for the id of a source. It need not lie under
    /// the root.
    /// </summary>
    public string Topic { get; init; } = string.Empty;

    /// <summary>Key of the source, <c>site.source</c>; null where the topic has <c>{source}</c>.</summary>
    public string? Source { get; init; }

    /// <summary>
    /// JSON Pointer (RFC 6901) to an array, each of whose items holds values and a time of its own; the other pointers then start at the
    /// item. Null where the message is one item.
    /// </summary>
    public string? Items { get; init; }

    /// <summary>JSON Pointer to the device time; null where there is none and the arrival counts.</summary>
    public string? Time { get; init; }

    /// <summary>How the time is written. Default <see cref="MappedTime.Rfc3339"/>.</summary>
    public MappedTime TimeFormat { get; init; } = MappedTime.Rfc3339;

    /// <summary>What is read from it, 1 to 1000 values.</summary>
    public IReadOnlyList<MappedValueOptions> Values { get; init; } = [];

    /// <summary>Everything wrong with this mapping.</summary>
    /// <param name="where">Name of the option that holds it.</param>
    public IEnumerable<Finding> Validate(string where) =>
    [
        .. OptionCheck.Must(TopicPattern.IsValid(Topic), $"{where}.{nameof(Topic)}", "The topic must be levels, + for any level, and at most one {source}.", Topic, "Write for example gateways/+/{source}/values."),
        .. OptionCheck.Must(
            Source is null ? Topic.Split('/').Contains(TopicPattern.SourceLevel) : SourceKey.TryParse(Source, out _) && !Topic.Contains('{', StringComparison.Ordinal), $"{where}.{nameof(Source)}", "The source must be given by its key or by {source} in the topic, not both.", Source, "Set for example hollin-vale.fir."),
        .. Pointer($"{where}.{nameof(Items)}", Items),
        .. Pointer($"{where}.{nameof(Time)}", Time),
        .. OptionCheck.Range($"{where}.{nameof(Values)}", Values.Count, 1, 1_000),
        .. OptionCheck.Must(Values.Select(value => value.Channel).Distinct(StringComparer.Ordinal).Count() == Values.Count, $"{where}.{nameof(Values)}", "Two values lead to one channel.", null, "Name each channel once."),
        .. Values.SelectMany((value, index) => value.Validate(FormattableString.Invariant($"{where}.{nameof(Values)}.{index}"))),
    ];

    internal static IEnumerable<Finding> Pointer(string where, string? pointer) =>
        OptionCheck.Must(pointer is null || JsonPointer.TryParse(pointer, out _), where, "This is no JSON Pointer (RFC 6901).", pointer, "Write for example /sensors/0/value; ~1 stands for a slash and ~0 for a tilde in a name.");
}
