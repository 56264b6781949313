namespace LabWatch.Lab.Identity;

/// <summary>What names a channel everywhere: its source and its id in that source, written <c>site.source/channel</c>.</summary>
/// <param name="Source">The source that the channel belongs to.</param>
/// <param name="Channel">Id of the channel in the source (a slug).</param>
public readonly record struct ChannelKey(SourceKey Source, string Channel)
{
    /// <summary>The key as <c>site.source/channel</c>.</summary>
    public override string ToString() => $"{Source}/{Channel}";
}
