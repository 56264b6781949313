using System.Buffers;
using System.Collections.Frozen;
using System.Text;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;

namespace LabWatch.Intake.Payloads;

/// <summary>The channels of one source, found by the bytes of their name without making a string.</summary>
internal sealed class SourceChannels
{
    private const int LongestId = 63;
    private readonly ChannelEntry[] _entries;
    private readonly FrozenDictionary<string, ChannelEntry>.AlternateLookup<ReadOnlySpan<char>> _byName;
    private readonly byte[] _prefix;

    public SourceChannels(ReferenceSource source)
    {
        Key = source.Key;
        _entries = [.. source.Channels.Select((channel, index) => new ChannelEntry(channel, index))];
        _byName = _entries.ToFrozenDictionary(entry => entry.Id, StringComparer.Ordinal).GetAlternateLookup<ReadOnlySpan<char>>();
        _prefix = Encoding.UTF8.GetBytes($"{source.Key}/");
    }

    public SourceKey Key { get; }

    public ReadOnlySpan<ChannelEntry> Entries => _entries;

    /// <summary>
    /// Finds a channel by its id, or by its key in full (<c>site.source/channel</c>). Devices repeat their channels in one order, so the
    /// entry after the last one found is tried first.
    /// </summary>
    public ChannelEntry? Find(ReadOnlySpan<byte> name, ChannelEntry? last)
    {
        int next = last is null || last.Index + 1 >= _entries.Length ? 0 : last.Index + 1;
        if (_entries.Length > 0 && name.SequenceEqual(_entries[next].IdUtf8))
        {
            return _entries[next];
        }

        ReadOnlySpan<byte> id = name.StartsWith(_prefix) ? name[_prefix.Length..] : name;
        Span<char> text = stackalloc char[LongestId];
        return id.Length <= LongestId
            && Ascii.ToUtf16(id, text, out int length) == OperationStatus.Done
            && _byName.TryGetValue(text[..length], out ChannelEntry? entry)
                ? entry
                : null;
    }
}
