using LabWatch.Intake.Payloads;
using LabWatch.Lab.Identity;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>What a connection may do.</summary>
/// <param name="Account">Name of its account; null where the broker asks for none.</param>
/// <param name="Root">Root of the topics that are taken in.</param>
/// <param name="OutRoot">Root of the topics that the service publishes.</param>
/// <param name="Source">The one source that it may publish for; null for every source.</param>
/// <param name="MappedSource">The source that a topic beside the root leads to by a mapping; null where it leads nowhere.</param>
internal sealed record DeviceRights(string? Account, string Root, string OutRoot, SourceKey? Source, Func<string, SourceKey?> MappedSource)
{
    private readonly string? _branch = Source is { } source ? $"{Root}/{source.Site}/{source.Source}" : null;

    /// <summary>Whether it may publish to a topic.</summary>
    public bool MayPublish(string topic) =>
        TopicMap.IsUnderRoot(topic, Root) && MappedSource(topic) is null
            ? _branch is null || IsAtOrUnder(topic, _branch)
            : MappedSource(topic) is { } mapped && (Source is null || mapped == Source);

    /// <summary>Whether it may subscribe to a filter: to what the service publishes, and to its own source's topics.</summary>
    public bool MaySubscribe(string filter) =>
        _branch is null || IsAtOrUnder(filter, OutRoot) || IsAtOrUnder(filter, _branch);

    private static bool IsAtOrUnder(string topic, string branch) =>
        topic.StartsWith(branch, StringComparison.Ordinal) && (topic.Length == branch.Length || topic[branch.Length] == '/');
}
