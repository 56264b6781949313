using System.Collections.Frozen;
using LabWatch.Lab;
using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Payloads;

/// <summary>
/// All topics that lead to a source or channel of one snapshot: <c>root/site/source</c> and <c>root/site/source/channel</c>.
/// </summary>
internal sealed class TopicMap
{
    private readonly string _prefix;
    private readonly string _site;
    private readonly FrozenDictionary<string, TopicRoute> _routes;

    public TopicMap(LabSnapshot snapshot, string root)
    {
        Snapshot = snapshot;
        _prefix = root + "/";
        _site = snapshot.Site.Id;
        var routes = new Dictionary<string, TopicRoute>(StringComparer.Ordinal);
        foreach (SourceChannels source in snapshot.Sources.Select(source => new SourceChannels(source)))
        {
            string topic = $"{root}/{source.Key.Site}/{source.Key.Source}";
            routes.Add(topic, new TopicRoute(source, null));
            foreach (ChannelEntry channel in source.Entries)
            {
                routes.Add($"{topic}/{channel.Id}", new TopicRoute(source, channel));
            }
        }

        _routes = routes.ToFrozenDictionary(StringComparer.Ordinal);
    }

    public LabSnapshot Snapshot { get; }

    public TopicRoute? Find(string topic) => _routes.GetValueOrDefault(topic);

    /// <summary>Whether a topic lies under the root and has no reserved level.</summary>
    public static bool IsUnderRoot(string topic, string root) =>
        topic.Length > root.Length + 1
        && topic.StartsWith(root, StringComparison.Ordinal)
        && topic[root.Length] == '/'
        && !HasReservedLevel(topic);

    /// <summary>Why a topic leads nowhere.</summary>
    public Finding Explain(string topic)
    {
        int levels = topic.StartsWith(_prefix, StringComparison.Ordinal) ? topic.AsSpan(_prefix.Length).Count('/') + 1 : 0;
        return HasReservedLevel(topic)
                ? Refuse(IntakeCode.TopicReserved, topic, "A level of the topic starts with a dollar sign; such topics belong to the broker.", "Publish to a topic without it.")
            : levels == 0
                ? Refuse(IntakeCode.TopicOutsideRoot, topic, $"The topic does not start with {_prefix}.", $"Publish to {_prefix}{_site}/<source>.")
            : levels is not (2 or 3)
                ? Refuse(IntakeCode.TopicLevels, topic, "The topic must be root, site and source, or these and a channel.", $"Publish to {_prefix}{_site}/<source>.")
            : levels == 3 && _routes.ContainsKey(topic[..topic.LastIndexOf('/')])
                ? Refuse(IntakeCode.UnknownChannel, topic, "The source has no channel of this name.", "Mend the topic or add the channel to the lab file.")
            : Refuse(IntakeCode.UnknownSource, topic, "The lab file has no source of this name.", "Mend the topic or add the source to the lab file.");
    }

    private static bool HasReservedLevel(string topic) => topic.StartsWith('$') || topic.Contains("/$", StringComparison.Ordinal);

    private static Finding Refuse(string code, string topic, string message, string cure) => new(code, "topic", message, Finding.Quote(topic), cure);
}
